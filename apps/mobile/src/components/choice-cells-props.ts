import type { ChoiceFrame } from '@/components/choice-props';

export type ChoiceCellsProps = ChoiceFrame & {
  kind: 'radio' | 'checkbox';
  cells: readonly {
    key: string;
    label: string;
    note?: string | undefined;
    chosen: boolean;
    choose: () => void;
  }[];
};
