export { OfficePegScreen as default } from '@/features/charts/office-peg-screen';
