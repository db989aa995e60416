import { useMemo, useState } from 'react';
import type { AccountView } from '@mereward/shared/accounts/contract';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Sheet } from '@/components/sheet';
import { SvgPicture } from '@/components/svg-picture';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { LINK_PART } from '@/features/surveys/bring-in-section';
import { handOver, type HandOver } from '@/features/surveys/handed-over';
import { countWords } from '@/features/surveys/visit-words';
import { figure } from '@/lib/format';
import { pageOrigin } from '@/lib/link-part';
import type { OutboxEntry } from '@/lib/outbox-event';
import { canPack, packedText } from '@/lib/packed-text';
import { CODE_HOLDS, qrDrawing } from '@/lib/qr-drawing';
import { saveText } from '@/lib/save-file';

const CODE_PX = 340;

type Code = { letters: number; drawing: string | null };

/** What waits as an address that a phone's camera opens, drawn as one code where it fits one. */
async function codeOf(file: HandOver, origin: string): Promise<Code> {
  const link = `${origin}/waiting#${LINK_PART}=${await packedText(JSON.stringify(file))}`;
  return { letters: link.length, drawing: qrDrawing(link, CODE_PX) };
}

type Props = { account: AccountView; entries: readonly OutboxEntry[] };

/** What waits here, given to another phone of the same person: as a file, or as one code to be looked at. */
export function HandOverSection({ account, entries }: Props) {
  const [open, setOpen] = useState(false);
  const left = useMemo(() => handOver(entries, { account, savedAt: '' }).left, [entries, account]);
  const made = (): HandOver => handOver(entries, { account, savedAt: new Date().toISOString() }).file;
  const saving = useMutation({
    mutationFn: () => {
      const file = made();
      const name = `mereward-waiting-${file.savedAt.slice(0, 10)}.json`;
      return saveText(name, `${JSON.stringify(file, null, 1)}\n`, 'application/json');
    },
  });
  const origin = pageOrigin();
  const drawing = useMutation({
    mutationFn: () => codeOf(made(), origin ?? ''),
    onSuccess: () => setOpen(true),
  });
  const code = drawing.data;
  if (left === entries.length) return null;
  return (
    <Section
      title="Send it from another phone"
      note="If this phone can’t, another can: save what waits, and bring it in there, signed in as yourself. Every thing keeps its own number, so it arrives once whichever phone sends it."
    >
      <Note kind="caution" title="Anybody who has the file or sees the code can read it">
        Where you cast, what you found and when stands in it in plain letters. Give it to nobody else, and
        delete the file when all is sent.
      </Note>
      {left > 0 ? (
        <Text>{`${countWords(left, 'thing')} can only be sent from this phone and ${left === 1 ? 'is' : 'are'} not in it.`}</Text>
      ) : null}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button
          label="Save what waits as a file"
          bank
          busy={saving.isPending}
          onPress={() => saving.mutate()}
        />
        {origin !== null && canPack() ? (
          <Button
            label="Show it as a QR code"
            bank
            busy={drawing.isPending}
            onPress={() => drawing.mutate()}
          />
        ) : null}
      </View>
      <ProblemNote problem={saving.error ?? drawing.error} />
      {saving.isSuccess ? (
        <Note kind="fine" title="Saved" live>
          It stays here too, and is still sent from here as soon as there is a signal.
        </Note>
      ) : null}
      <Sheet
        open={open && code !== undefined}
        title="Look at it with the other phone"
        onClose={() => setOpen(false)}
      >
        {code?.drawing ? (
          <>
            <Text>
              Point the other phone’s camera at it and open the address. What waits is shown there first.
            </Text>
            <View style={{ alignItems: 'center' }}>
              <SvgPicture svg={code.drawing} label="QR code of what waits" />
            </View>
          </>
        ) : (
          <Text>{`It is too much for one code: ${figure(code?.letters ?? 0)} letters, where one that a phone can read holds ${figure(CODE_HOLDS)}. Save it as a file.`}</Text>
        )}
      </Sheet>
    </Section>
  );
}
