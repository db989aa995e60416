export { LakePlaceScreen as default } from '@/features/charts/lake-place-screen';
