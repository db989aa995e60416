export { LogScreen as default } from '@/features/charts/log-screen';
