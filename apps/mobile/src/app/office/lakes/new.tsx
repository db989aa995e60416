export { MakeLakeScreen as default } from '@/features/charts/make-lake-screen';
