export { ClosuresScreen as default } from '@/features/closures/closures-screen';
