export { LakePicturesScreen as default } from '@/features/charts/lake-pictures-screen';
