export { NewLeadScreen as default } from '@/features/surveys/new-lead-screen';
