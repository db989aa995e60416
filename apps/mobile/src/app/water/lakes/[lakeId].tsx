export { LakeScreen as default } from '@/features/charts/lake-screen';
