export { BankScreen as default } from '@/features/surveys/bank-screen';
