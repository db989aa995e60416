export { MoneyScreen as default } from '@/features/payments/money-screen';
