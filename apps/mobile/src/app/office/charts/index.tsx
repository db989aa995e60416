export { OfficeChartsScreen as default } from '@/features/charts/office-charts-screen';
