export { EmergencyScreen as default } from '@/features/charts/emergency-screen';
