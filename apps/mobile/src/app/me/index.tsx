export { MeScreen as default } from '@/features/accounts/me-screen';
