export { LogNewScreen as default } from '@/features/surveys/log-new-screen';
