export { NoticesScreen as default } from '@/features/notices/notices-screen';
