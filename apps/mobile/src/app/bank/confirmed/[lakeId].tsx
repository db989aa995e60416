export { ConfirmBottomScreen as default } from '@/features/charts/confirm-bottom-screen';
