export { DraftChartScreen as default } from '@/features/charts/draft-chart-screen';
