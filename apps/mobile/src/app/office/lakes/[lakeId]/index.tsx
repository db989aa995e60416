export { OfficeLakeScreen as default } from '@/features/charts/office-lake-screen';
