export { WaterFrontScreen as default } from '@/features/notices/water-front-screen';
