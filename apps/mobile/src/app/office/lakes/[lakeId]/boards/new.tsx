export { NewBoardScreen as default } from '@/features/charts/board-form-screen';
