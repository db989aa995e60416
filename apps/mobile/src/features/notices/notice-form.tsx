import { useState } from 'react';
import { NoticeDetails, NoticeSeverity, type NoticeView } from '@mereward/shared/notices/contract';
import { useController } from 'react-hook-form';
import { Button } from '@/components/button';
import { ManyChoiceGrid } from '@/components/choice-grid';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { changeNotice, writeNotice } from '@/features/notices/api';
import { draftOfNotice, freshNotice, NoticeDraft, noticeOf } from '@/features/notices/notice-draft';
import { AUDIENCE_WORDS, SEVERITY_WORDS } from '@/features/notices/notice-words';
import { useDraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';

type Props = {
  fisheryId: string;
  zone: string;
  lakes: readonly { id: string; name: string }[];
  notice: NoticeView | null;
  onDone: () => void;
};

/** Writes a notice, or changes one. */
export function NoticeForm({ fisheryId, zone, lakes, notice, onDone }: Props) {
  const [id] = useState(() => notice?.id ?? newId());
  const [start] = useState(() => (notice ? draftOfNotice(notice, zone) : freshNotice(zone, Date.now())));
  const form = useDraftForm({
    form: notice ? `notice:${id}:${String(notice.version)}` : `notice:new:${fisheryId}`,
    schema: NoticeDraft,
    start,
    send: async (draft) => {
      const wish = noticeOf(id, draft, zone);
      if (notice) await changeNotice({ ...wish, version: notice.version });
      else await writeNotice(fisheryId, wish);
    },
    onDone: () => {
      if (!notice) form.startAfresh();
      onDone();
    },
  });
  const chosen = useController({ control: form.control, name: 'lakeIds' });
  return (
    <DraftFormFrame
      form={form}
      label="Notice"
      act={notice ? 'Keep the change' : 'Put it up'}
      busyLabel="Keeping…"
      beside={<Button label="Leave it" kind="quiet" onPress={onDone} />}
    >
      <FormField control={form.control} name="title" label="Title" />
      <FormField
        control={form.control}
        name="text"
        label="What it says"
        hint="At most 500 letters."
        lines={4}
      />
      <FormChoice
        control={form.control}
        name="severity"
        label="How grave"
        hint="Danger and closed can’t be put away by readers."
        choices={NoticeSeverity.options.map((key) => ({ key, label: SEVERITY_WORDS[key] }))}
        columns={2}
        bank={false}
      />
      <FormChoice
        control={form.control}
        name="audience"
        label="Who reads it"
        choices={NoticeDetails.shape.audience.options.map((key) => ({ key, label: AUDIENCE_WORDS[key] }))}
        columns={2}
        bank={false}
      />
      <ManyChoiceGrid
        label="Where"
        hint="None chosen: the whole fishery."
        choices={lakes.map(({ id: key, name: label }) => ({ key, label }))}
        values={chosen.field.value}
        onChange={chosen.field.onChange}
        columns={1}
        bank={false}
      />
      <FormField
        control={form.control}
        name="from"
        label="From"
        hint={`By the fishery’s clock (${zone}).`}
        picker="datetime-local"
      />
      <FormField
        control={form.control}
        name="until"
        label="Until"
        hint="Empty: until it is taken down."
        picker="datetime-local"
        optional
      />
    </DraftFormFrame>
  );
}
