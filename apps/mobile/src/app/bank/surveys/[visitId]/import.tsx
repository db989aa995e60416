export { ImportScreen as default } from '@/features/surveys/import-screen';
