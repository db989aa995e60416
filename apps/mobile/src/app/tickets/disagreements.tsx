export { MyDisagreementsScreen as default } from '@/features/charts/my-disagreements-screen';
