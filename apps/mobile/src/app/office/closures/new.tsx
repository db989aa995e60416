export { CloseScreen as default } from '@/features/closures/close-screen';
