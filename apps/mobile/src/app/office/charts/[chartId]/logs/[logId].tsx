export { ChartLogScreen as default } from '@/features/charts/chart-log-screen';
