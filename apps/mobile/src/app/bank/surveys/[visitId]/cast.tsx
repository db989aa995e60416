export { CastNextScreen as default } from '@/features/charts/cast-next-screen';
