export { MarkScreen as default } from '@/features/charts/mark-screen';
