import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import { SpotDetails, type SpotView } from '@mereward/shared/charts/contract';
import type { LakeView, PegView } from '@mereward/shared/lakes/contract';
import { FormProvider } from 'react-hook-form';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { FormField } from '@/components/form-field';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { NewerNote } from '@/components/newer-note';
import { Page } from '@/components/page';
import { usePegPage } from '@/features/charts/api';
import { placeOf } from '@/features/charts/outline-drawing';
import { putSpot } from '@/features/charts/spot-api';
import { SpotPlace } from '@/features/charts/spot-place';
import { useLake } from '@/features/lakes/api';
import { usePeg } from '@/features/lakes/office-api';
import { useDraftForm } from '@/hooks/use-draft-form';
import { useHeld } from '@/hooks/use-held';
import { newId } from '@/lib/new-id';
import { positionText, typedPosition } from '@/lib/position-text';
import { typedNumber } from '@/lib/typed-schemas';

const Wanted = z.object({
  details: SpotDetails.extend({
    name: z.string().trim().min(1, 'Give the spot a name: “the gravel bar”.').max(80, 'At most 80 letters.'),
    position: typedPosition('Choose a cast, tap the spot on the water, or type its latitude and longitude'),
    usableRadiusM: typedNumber({ what: 'The radius', min: 0.3, max: 20, unit: 'm' }),
  }),
});

/** Writes up a new spot, or changes one. */
export function SpotFormScreen() {
  const { lakeId, pegId, spotId } = useLocalSearchParams<{ lakeId: string; pegId: string; spotId: string }>();
  const lake = useLake(lakeId);
  const peg = usePeg(pegId);
  const page = usePegPage(pegId);
  const number = peg.data?.details.number ?? '';
  const isNew = spotId === 'new';
  const spot = page.data?.spots?.find(({ id }) => id === spotId);
  return (
    <Page
      title={isNew ? 'A new spot' : (spot?.name ?? 'Spot')}
      over={`Peg ${number}`}
      back={{ label: `Peg ${number}`, href: `/office/lakes/${lakeId}/pegs/${pegId}` }}
    >
      <Loaded query={lake} waiting="Reading the lake…">
        {(theLake) => (
          <Loaded query={peg} waiting="Reading the peg…">
            {(thePeg) => (
              <Loaded
                query={page}
                waiting="Reading the spots…"
                empty={{
                  when: () => !isNew && spot === undefined,
                  show: <Empty title="No such spot">It may have been taken away. Go back to the peg.</Empty>,
                }}
              >
                {() =>
                  spot ? (
                    <Spot lake={theLake} peg={thePeg} now={spot} />
                  ) : (
                    <SpotFields lake={theLake} peg={thePeg} spot={null} />
                  )
                }
              </Loaded>
            )}
          </Loaded>
        )}
      </Loaded>
    </Page>
  );
}

type Props = { lake: LakeView; peg: PegView };

function Spot({ lake, peg, now }: Props & { now: SpotView }) {
  const { held, hold, newer } = useHeld(now);
  return (
    <>
      {newer ? <NewerNote what="this spot" onTake={() => hold(newer)} /> : null}
      <SpotFields key={held.version} lake={lake} peg={peg} spot={held} />
    </>
  );
}

function SpotFields({ lake, peg, spot }: Props & { spot: SpotView | null }) {
  const router = useRouter();
  const [fresh] = useState(newId);
  const spotId = spot?.id ?? fresh;
  const version = spot?.version ?? null;
  const pegHref = `/office/lakes/${lake.id}/pegs/${peg.id}` as const;
  const form = useDraftForm({
    form: `spot:${peg.id}:${spot ? `${spotId}:${String(version)}` : 'new'}`,
    schema: Wanted,
    start: {
      details: {
        name: spot?.name ?? '',
        position: spot ? positionText(placeOf(lake.origin, spot)) : '',
        usableRadiusM: String(spot?.usableRadiusM ?? 2),
        note: spot?.note ?? '',
      },
    },
    send: ({ details }) => putSpot({ pegId: peg.id, spotId }, { details, version }),
    onDone: () => router.replace(pegHref),
  });
  const { control } = form;
  return (
    <FormProvider {...form}>
      <DraftFormFrame
        form={form}
        label="Spot"
        act="Keep the spot"
        busyLabel="Keeping…"
        beside={<LinkButton label="Leave it" href={pegHref} />}
      >
        <FormField control={control} name="details.name" label="Name" />
        <SpotPlace lake={lake} peg={peg} />
        <FormField
          control={control}
          name="details.usableRadiusM"
          label="Usable within, metres"
          hint="How far off one may land and still be on it. Depth and bottom are quoted from a cast within it."
          keypad="decimal"
        />
        <FormField control={control} name="details.note" label="Note" lines={3} optional />
      </DraftFormFrame>
    </FormProvider>
  );
}
