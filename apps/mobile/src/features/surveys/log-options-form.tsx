import type { LogOptions, LogPreview, LogView } from '@mereward/shared/surveys/log-contract';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { LogDraft, logOptionsOf, typedLog } from '@/features/surveys/log-draft';
import { LogOptionsPart } from '@/features/surveys/log-options-part';
import { useDraftForm } from '@/hooks/use-draft-form';

type Props = {
  log: LogView;
  preview: LogPreview;
  onLook: (options: LogOptions) => Promise<LogView>;
};

/** Changes how a log is read, and reads it again. */
export function LogOptionsForm({ log, preview, onLook }: Props) {
  const form = useDraftForm({
    form: `log:${log.id}`,
    schema: LogDraft,
    start: typedLog(preview.guessed),
    send: (read) => onLook(logOptionsOf(read)),
  });
  return (
    <DraftFormFrame form={form} label="How it is read" act="Read it again" busyLabel="Asking…" bank>
      <LogOptionsPart control={form.control} preview={preview} />
    </DraftFormFrame>
  );
}
