export { ChartCastScreen as default } from '@/features/charts/chart-cast-screen';
