import { View } from 'react-native';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { Text } from '@/components/text';
import type { VisitShown } from '@/features/surveys/shown-visit';
import { countWords } from '@/features/surveys/visit-words';

/** What of a visit is on this phone only, over its page. Nothing when all is sent. */
export function SendingNote({ value: { unsent, opening, closing } }: { value: VisitShown }) {
  const states = Object.values(unsent);
  const waiting = states.filter((state) => state === 'waiting').length;
  const refused = [...states, opening, closing].filter((state) => state === 'refused').length;
  const parts = [
    opening === 'waiting' ? 'its opening' : '',
    waiting > 0 ? countWords(waiting, 'cast') : '',
    closing === 'waiting' ? 'its closing' : '',
  ].filter(Boolean);
  if (parts.length === 0 && refused === 0) return null;
  return (
    <Note
      kind="caution"
      title={refused > 0 ? `${String(refused)} of this visit refused` : 'Not all of this visit is sent yet'}
    >
      {parts.length > 0 ? (
        <Text>{`On this phone only: ${parts.join(', ')}. Reduced here, and sent as soon as there is a signal.`}</Text>
      ) : null}
      {refused > 0 ? (
        <View style={{ alignItems: 'flex-start' }}>
          <LinkButton label="See what was refused" href="/waiting" bank />
        </View>
      ) : null}
    </Note>
  );
}
