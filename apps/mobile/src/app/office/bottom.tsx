export { BottomTableScreen as default } from '@/features/surveys/bottom-table-screen';
