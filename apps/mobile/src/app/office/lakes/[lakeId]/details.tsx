export { LakeDetailsScreen as default } from '@/features/lakes/lake-details-screen';
