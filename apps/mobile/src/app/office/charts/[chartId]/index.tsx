export { ChartReviewScreen as default } from '@/features/charts/chart-review-screen';
