export { LeadsScreen as default } from '@/features/surveys/leads-screen';
