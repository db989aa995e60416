export { CastStepsScreen as default } from '@/features/surveys/cast-steps-screen';
