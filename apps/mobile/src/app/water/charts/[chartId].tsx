export { ChartScreen as default } from '@/features/charts/chart-screen';
