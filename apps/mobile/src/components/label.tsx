import { Text } from '@/components/text';

type Props = { id: string; words: string; optional?: boolean | undefined };

/** The words above a control. `id` is the control's. */
export function Label({ id, words, optional = false }: Props) {
  return (
    <Text nativeID={`${id}-label`} weight="semibold" size="small">
      {words}
      {optional ? ' (if you like)' : ''}
    </Text>
  );
}
