export { KitScreen as default } from '@/features/surveys/kit-screen';
