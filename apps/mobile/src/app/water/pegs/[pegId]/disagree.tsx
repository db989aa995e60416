export { DisagreeScreen as default } from '@/features/charts/disagree-screen';
