import type { GaugeBoardView, LakeView } from '@mereward/shared/lakes/contract';
import type { OpenVisit, VisitView } from '@mereward/shared/surveys/contract';
import { toMetres } from '@mereward/shared/units/length';
import { z } from 'zod';
import { KitDraft, kitOf, kitToStartFrom } from '@/features/surveys/kit-draft';
import { typedNumber } from '@/lib/typed-schemas';

const FORCES = ['', '0', '1', '2', '3', '4', '5', '6', '7', '8'] as const;
const QUARTERS = ['', 'N', 'NE', 'E', 'SE', 'S', 'SW', 'W', 'NW'] as const;

/** What is typed to open a visit; the gauge as it stands on the board, in the board's own unit. */
export const VisitDraft = z.object({
  id: z.string(), // '' until it is first sent: a second try opens the same visit
  startedAt: z.string(),
  title: z.string().trim().min(1, 'Give the visit a name.').max(120, 'At most 120 letters.'),
  competence: z.enum(['trainee', 'competent', 'lead']),
  gauge: typedNumber({ what: 'The reading', min: -100, max: 300 }),
  windForce: z.enum(FORCES),
  windFrom: z.enum(QUARTERS),
  weatherNote: z.string().max(300, 'At most 300 letters.'),
  clarity: z.string().max(120, 'At most 120 letters.'),
  weedState: z.string().max(120, 'At most 120 letters.'),
  kit: KitDraft,
  consentToPublish: z.boolean(),
});
export type VisitTyped = z.input<typeof VisitDraft>;
export type VisitRead = z.output<typeof VisitDraft>;

/** The one board that chart datum is read on; a visit is levelled by it. */
export const datumBoard = ({ boards }: LakeView): GaugeBoardView | null =>
  boards.find(({ details }) => details.isDatumBoard) ?? null;

/** A visit not opened yet: the lake's last kit, or a usual one, and what is known of the surveyor. */
export function visitToStartFrom(lake: LakeView, last: VisitView | null): VisitTyped {
  const competence = z.enum(['trainee', 'competent', 'lead']).safeParse(last?.competence);
  return {
    id: '',
    startedAt: '',
    title: `${lake.details.name} survey`.slice(0, 120),
    competence: competence.success ? competence.data : 'competent',
    gauge: '',
    windForce: '',
    windFrom: '',
    weatherNote: '',
    clarity: '',
    weedState: last?.weedState ?? '',
    kit: kitToStartFrom(last?.kit ?? null),
    consentToPublish: true,
  };
}

type Opening = { board: GaugeBoardView; id: string; startedAt: string };

export function visitOf(read: VisitRead, { board, id, startedAt }: Opening): OpenVisit {
  return {
    id,
    startedAt,
    title: read.title,
    competence: read.competence,
    boardId: board.id,
    gaugeStartM: toMetres(read.gauge, board.details.unit),
    weather: {
      windForce: read.windForce === '' ? null : Number(read.windForce),
      windFrom: read.windFrom === '' ? null : read.windFrom,
      note: read.weatherNote.trim(),
    },
    clarity: read.clarity.trim(),
    weedState: read.weedState.trim(),
    kit: kitOf(read.kit),
    consentToPublish: read.consentToPublish,
  };
}

type Opened = { lake: LakeView; surveyor: { id: string; name: string } | null };

/** A visit as the server will answer it once it is opened there: what the screens show meanwhile. */
export function openedView(visit: OpenVisit, { lake, surveyor }: Opened): VisitView {
  return {
    ...visit,
    lakeId: lake.id,
    lakeName: lake.details.name,
    surveyor: { id: surveyor?.id ?? '', name: surveyor?.name ?? '' },
    status: 'open',
    endedAt: null,
    gaugeEndM: null,
    datumM: lake.details.datumM,
    castCount: 0,
    soundingCount: 0,
    version: 1,
    may: { addCasts: lake.may.survey, correct: lake.may.survey },
  };
}
