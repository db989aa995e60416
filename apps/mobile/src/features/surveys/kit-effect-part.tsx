import { Empty } from '@/components/empty';
import { Facts } from '@/components/facts';
import { LinkButton } from '@/components/link-button';
import { Section } from '@/components/section';
import { Table } from '@/components/table';
import { Text } from '@/components/text';
import { BOTTOM_WORDS } from '@/features/surveys/call-words';
import type { CastChange, KitEffect } from '@/features/surveys/kit-effect';
import { Bottom } from '@mereward/shared/surveys/contract';
import { figure } from '@/lib/format';

/** Before and after: what a corrected constant did. */
export function KitEffectPart({ effect, visitId }: { effect: KitEffect; visitId: string }) {
  const { casts, changed, moved, depths } = effect;
  const back = <LinkButton label="To the visit" href={`/bank/surveys/${visitId}`} kind="main" bank />;
  if (changed.length === 0)
    return (
      <Empty title="The kit is kept; no cast changed" action={back}>
        {`${figure(casts)} casts were reduced again and came out the same.`}
      </Empty>
    );
  return (
    <>
      <Text>{`${figure(casts)} casts were reduced again; ${figure(changed.length)} came out otherwise.`}</Text>
      <Facts
        facts={[
          {
            term: 'Moved',
            fact:
              moved.count === 0
                ? 'none'
                : `${figure(moved.count)}, by ${figure(moved.meanM, 2)} m on average, ${figure(moved.mostM, 2)} m at most`,
          },
          { term: 'Depth', fact: depths.count === 0 ? 'none' : depthWords(depths) },
          { term: 'Bottom', fact: effect.bottoms === 0 ? 'none' : `${figure(effect.bottoms)} changed` },
          { term: 'Grade', fact: effect.grades === 0 ? 'none' : `${figure(effect.grades)} changed` },
        ]}
      />
      {back}
      <Section title="Cast by cast">
        <Table
          caption="Casts that came out otherwise"
          rows={changed}
          rowKey={({ id }) => id}
          href={({ id }) => `/bank/surveys/${visitId}/casts/${id}`}
          csvName="kit-correction"
          columns={COLUMNS}
        />
      </Section>
    </>
  );
}

const depthWords = ({ count, meanM, mostM }: KitEffect['depths']): string =>
  `${figure(count)}, ${figure(Math.abs(meanM), 2)} m ${meanM > 0 ? 'deeper' : 'shallower'} on average, ${figure(mostM, 2)} m at most`;

function bottomWord(bottom: string): string {
  const known = Bottom.safeParse(bottom);
  return known.success ? BOTTOM_WORDS[known.data] : bottom;
}

const COLUMNS = [
  {
    key: 'seq',
    head: 'Cast',
    value: ({ seq }: CastChange) => seq,
    show: ({ seq }: CastChange) => `Cast ${seq}`,
  },
  {
    key: 'moved',
    head: 'Moved, m',
    figures: true,
    value: ({ movedM }: CastChange) => movedM,
    show: ({ movedM }: CastChange) => (movedM === null ? '–' : figure(movedM, 2)),
  },
  {
    key: 'before',
    head: 'Depth before, m',
    figures: true,
    value: ({ depthBeforeM }: CastChange) => depthBeforeM,
    show: ({ depthBeforeM }: CastChange) => (depthBeforeM === null ? '–' : figure(depthBeforeM, 2)),
  },
  {
    key: 'after',
    head: 'Depth after, m',
    figures: true,
    value: ({ depthAfterM }: CastChange) => depthAfterM,
    show: ({ depthAfterM }: CastChange) => (depthAfterM === null ? '–' : figure(depthAfterM, 2)),
  },
  {
    key: 'bottom',
    head: 'Bottom',
    value: ({ bottom }: CastChange) =>
      bottom ? `${bottomWord(bottom.before)} → ${bottomWord(bottom.after)}` : null,
  },
  {
    key: 'grade',
    head: 'Grade',
    value: ({ grade }: CastChange) => (grade ? `${grade.before} → ${grade.after}` : null),
  },
] as const;
