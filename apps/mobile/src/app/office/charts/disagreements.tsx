export { DisagreementsScreen as default } from '@/features/charts/disagreements-screen';
