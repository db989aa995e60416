import type { LogPreview, LogView } from '@mereward/shared/surveys/log-contract';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { useLookAgain } from '@/features/surveys/log-api';
import { LogDraft, logOptionsOf, typedLog } from '@/features/surveys/log-draft';
import { LogOptionsPart } from '@/features/surveys/log-options-part';
import { useDraftForm } from '@/hooks/use-draft-form';

/** Changes how a log is read, and reads it again. */
export function LogOptionsForm({ log, preview }: { log: LogView; preview: LogPreview }) {
  const look = useLookAgain(log.id);
  const form = useDraftForm({
    form: `log:${log.id}`,
    schema: LogDraft,
    start: typedLog(preview.guessed),
    send: (read) => look.mutateAsync(logOptionsOf(read)),
  });
  return (
    <DraftFormFrame form={form} label="How it is read" act="Read it again" busyLabel="Asking…" bank>
      <LogOptionsPart control={form.control} preview={preview} />
    </DraftFormFrame>
  );
}
