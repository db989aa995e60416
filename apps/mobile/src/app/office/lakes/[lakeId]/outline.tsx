export { LakeOutlineScreen as default } from '@/features/charts/lake-outline-screen';
