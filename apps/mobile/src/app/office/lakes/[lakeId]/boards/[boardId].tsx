export { BoardScreen as default } from '@/features/charts/board-screen';
