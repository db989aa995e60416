export { WaitingScreen as default } from '@/components/waiting-screen';
