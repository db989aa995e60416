export { NewMarkScreen as default } from '@/features/charts/mark-screen';
