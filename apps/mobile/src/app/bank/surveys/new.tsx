export { NewVisitScreen as default } from '@/features/surveys/new-visit-screen';
