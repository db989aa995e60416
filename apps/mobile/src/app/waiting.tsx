export { WaitingScreen as default } from '@/features/surveys/waiting-screen';
