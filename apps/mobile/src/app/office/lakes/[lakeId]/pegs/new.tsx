export { NewPegScreen as default } from '@/features/charts/new-peg-screen';
