export { OfficeGate as default } from '@/features/accounts/place-gate';
