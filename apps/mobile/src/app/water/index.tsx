export { WaterScreen as default } from '@/features/lakes/water-screen';
