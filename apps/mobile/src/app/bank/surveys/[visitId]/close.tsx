export { CloseScreen as default } from '@/features/surveys/close-screen';
