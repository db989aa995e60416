export { BottomEventsScreen as default } from '@/features/charts/bottom-events-screen';
