import { useState, type ReactNode } from 'react';
import type { FisheryListItem, FisheryView } from '@mereward/shared/fisheries/contract';
import type { TicketType, TicketTypeView } from '@mereward/shared/tickets/contract';
import { FormProvider } from 'react-hook-form';
import { View } from 'react-native';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { space } from '@/constants/layout';
import { TicketQuote } from '@/features/tickets/ticket-quote';
import { TicketTypeDraft, type TypedTicketType } from '@/features/tickets/ticket-type-draft';
import { TicketTypeForm } from '@/features/tickets/ticket-type-form';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { useThreeColumns } from '@/hooks/use-wide';
import { civilTime } from '@/lib/zoned-time';

const Wanted = z.object({ details: TicketTypeDraft });

/** The civil day at the fishery when the screen was opened. */
export function useToday(zone: string): string {
  const [today] = useState(() => civilTime(Date.now(), zone).slice(0, 10));
  return today;
}

type Props = {
  /** Names the draft among this person's forms. */
  draft: string;
  fishery: FisheryListItem;
  about: FisheryView;
  start: TypedTicketType;
  act: string;
  send: (details: TicketType) => Promise<TicketTypeView>;
  onDone: () => void;
  beside: ReactNode;
};

/** A kind of ticket being written, with what it would cost told beside it. */
export function TicketTypeEditor({ draft, fishery, about, start, act, send, onDone, beside }: Props) {
  const roomy = useThreeColumns();
  const { zone } = about.details;
  const today = useToday(zone);
  const form: DraftForm<z.input<typeof Wanted>, z.output<typeof Wanted>> = useDraftForm({
    form: draft,
    schema: Wanted,
    start: { details: start },
    send: ({ details }) => send(details),
    onDone: () => {
      form.startAfresh();
      onDone();
    },
  });
  const quote = <TicketQuote fishery={fishery} zone={zone} today={today} />;
  return (
    <FormProvider {...form}>
      <View style={{ flexDirection: roomy ? 'row' : 'column', gap: space.wide, alignItems: 'stretch' }}>
        <View style={roomy ? { flex: 1, minWidth: 0 } : {}}>
          <DraftFormFrame form={form} label="Kind of ticket" act={act} busyLabel="Keeping…" beside={beside}>
            <TicketTypeForm fishery={fishery} today={today} />
            {roomy ? null : quote}
          </DraftFormFrame>
        </View>
        {roomy ? (
          <View style={{ width: 380 }}>
            <View style={{ position: 'sticky' as 'relative', top: space.page }}>{quote}</View>
          </View>
        ) : null}
      </View>
    </FormProvider>
  );
}
