export { FixPictureScreen as default } from '@/features/charts/fix-picture-screen';
