export { NowhereScreen as default } from '@/components/nowhere-screen';
