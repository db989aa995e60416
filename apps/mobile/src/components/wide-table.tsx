export { CardTable as WideTable } from '@/components/card-table';
