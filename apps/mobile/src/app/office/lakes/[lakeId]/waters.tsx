export { WatersScreen as default } from '@/features/charts/waters-screen';
