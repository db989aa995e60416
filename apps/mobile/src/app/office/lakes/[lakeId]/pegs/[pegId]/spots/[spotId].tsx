export { SpotFormScreen as default } from '@/features/charts/spot-form-screen';
