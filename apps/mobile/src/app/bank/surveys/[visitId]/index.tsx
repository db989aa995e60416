export { VisitScreen as default } from '@/features/surveys/visit-screen';
