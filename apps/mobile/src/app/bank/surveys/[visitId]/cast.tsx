export { CastScreen as default } from '@/features/surveys/cast-screen';
