export { NewLakePlaceScreen as default } from '@/features/charts/lake-place-screen';
