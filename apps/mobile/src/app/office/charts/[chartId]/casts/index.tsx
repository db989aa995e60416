export { ChartCastsScreen as default } from '@/features/charts/chart-casts-screen';
