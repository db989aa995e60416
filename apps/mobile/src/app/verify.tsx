export { VerifyScreen as default } from '@/features/accounts/verify-screen';
