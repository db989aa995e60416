export { SignUpScreen as default } from '@/features/accounts/sign-up-screen';
