export { PegScreen as default } from '@/features/charts/peg-screen';
