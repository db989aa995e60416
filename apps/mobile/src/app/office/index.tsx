export { OfficeScreen as default } from '@/features/charts/office-screen';
