export { ForgottenScreen as default } from '@/features/accounts/forgotten-screen';
