export { LakesScreen as default } from '@/features/lakes/lakes-screen';
