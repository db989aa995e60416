import { useMemo, useState } from 'react';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { ArcCoverage, VisitWithCasts } from '@mereward/shared/surveys/contract';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Section } from '@/components/section';
import { Select } from '@/components/select';
import { SvgPicture } from '@/components/svg-picture';
import { Text } from '@/components/text';
import { StatusShape } from '@/components/status-shape';
import { arcGround } from '@/features/surveys/arc-ground';
import { arcSketchSvg } from '@/features/surveys/arc-sketch';
import { useStance } from '@/features/surveys/api';
import { GradeKey } from '@/features/surveys/grade-key';
import { countWords } from '@/features/surveys/visit-words';
import { useTheme } from '@/hooks/use-theme';
import { percent } from '@/lib/format';

const ENOUGH_SHARE = 0.6;
const ENOUGH_REPEATS = 0.1;

type Props = { value: VisitWithCasts; lake: LakeView; bare: boolean };

/** How much of each peg's arc is covered, and where its casts fell. */
export function CoverageSection({ value, lake, bare }: Props) {
  const { coverage, casts } = value;
  const last = casts.at(-1)?.pegId ?? null;
  const [chosen, setChosen] = useState<string | null>(null);
  const pegId = chosen ?? last;
  const numberOf = new Map(lake.pegs.map(({ id, number }, at) => [id, { number, at }]));
  const pegs = coverage
    .map((each) => ({
      ...each,
      ...(numberOf.get(each.pegId) ?? { number: 'a peg of before', at: Infinity }),
    }))
    .sort((a, b) => a.at - b.at);
  const shown = pegs.find((each) => each.pegId === pegId);
  return (
    <Section
      title="Coverage"
      bare={bare}
      note="A chart asks for 60 % of a peg’s arc, and a tenth of its casts made again."
    >
      {pegs.length > 1 ? (
        <Select
          label="Peg"
          bank
          choices={pegs.map((each) => ({
            key: each.pegId,
            label: `${each.number}: ${percent(each.share)}, ${countWords(each.casts, 'cast')}`,
          }))}
          value={pegId}
          onChange={setChosen}
        />
      ) : null}
      {pegId ? <PegSketch pegId={pegId} value={value} lake={lake} /> : null}
      {shown ? (
        <List label={`Coverage of peg ${shown.number}`}>
          <Row
            title={`${percent(shown.share, 1)} of peg ${shown.number}’s arc`}
            note={countWords(shown.casts, 'cast')}
            end={<Enough is={shown.share >= ENOUGH_SHARE} />}
          />
          <Row
            title={`${percent(shown.repeatsShare, 1)} made again`}
            note="another throw within 2 m"
            end={<Enough is={shown.repeatsShare >= ENOUGH_REPEATS} />}
          />
        </List>
      ) : null}
      <Thin pegs={pegs} />
    </Section>
  );
}

const Enough = ({ is }: { is: boolean }) =>
  is ? (
    <StatusShape shape="triangle" tone="reed" word="enough" />
  ) : (
    <StatusShape shape="diamond" tone="amber" word="too little" />
  );

function Thin({ pegs }: { pegs: readonly (ArcCoverage & { number: string })[] }) {
  const thin = pegs.filter(({ share }) => share < ENOUGH_SHARE);
  if (pegs.length < 2 || thin.length === 0) return null;
  return (
    <Text size="small" tone="inkSoft">
      {`Below 60 %: ${thin.map(({ number, share }) => `${number} (${percent(share)})`).join(', ')}.`}
    </Text>
  );
}

function PegSketch({ pegId, value, lake }: { pegId: string; value: VisitWithCasts; lake: LakeView }) {
  const { colours } = useTheme();
  const peg = useStance(pegId);
  const ground = useMemo(
    () => (peg.data ? arcGround(lake, value.casts, { peg: peg.data, visit: value.visit }) : null),
    [lake, value, peg.data],
  );
  return (
    <Loaded query={peg} waiting="Reading the peg…">
      {() =>
        ground ? (
          <>
            <SvgPicture svg={arcSketchSvg({ ...ground, now: null }, colours)} />
            <GradeKey />
          </>
        ) : null
      }
    </Loaded>
  );
}
