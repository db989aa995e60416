export { BankGate as default } from '@/features/accounts/place-gate';
