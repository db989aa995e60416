export { ResetPasswordScreen as default } from '@/features/accounts/reset-password-screen';
