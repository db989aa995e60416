import { useMemo, useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { LakeView } from '@mereward/shared/lakes/contract';
import type { LakePictureView } from '@mereward/shared/lakes/picture-contract';
import { FEWEST_POINTS } from '@mereward/shared/geometry/picture-fit';
import { View } from 'react-native';
import { useController } from 'react-hook-form';
import { ChoiceGrid } from '@/components/choice-grid';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { NewerNote } from '@/components/newer-note';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Waiting } from '@/components/waiting';
import { space } from '@/constants/layout';
import { PictureCanvas } from '@/features/charts/picture-canvas';
import { FitFound, PointFields, PointList } from '@/features/charts/picture-points';
import { useLake } from '@/features/lakes/api';
import { fixLakePicture, useLakePictures, usePictureUrl } from '@/features/lakes/picture-api';
import {
  draftOf,
  finishedPoints,
  fittingOf,
  TypedPoints,
  type DraftPoint,
} from '@/features/lakes/picture-draft';
import { useDraftForm } from '@/hooks/use-draft-form';
import { useHeld } from '@/hooks/use-held';

/** Says how a picture lies: places on it that are known. */
export function FixPictureScreen() {
  const { lakeId, pictureId } = useLocalSearchParams<{ lakeId: string; pictureId: string }>();
  const lake = useLake(lakeId);
  const mayChange = lake.data?.may.change ?? false;
  const pictures = useLakePictures(lakeId, mayChange);
  const picture = pictures.data?.pictures.find(({ id }) => id === pictureId) ?? null;
  return (
    <Page
      title="Known points of a picture"
      width="wide"
      {...(lake.data ? { over: lake.data.details.name } : {})}
      back={{ label: 'Pictures', href: `/office/lakes/${lakeId}/pictures` }}
    >
      <Loaded query={lake} waiting="Reading the lake…">
        {(value) =>
          value.may.change ? (
            <Loaded query={pictures} waiting="Reading the picture…">
              {() => <Picture lake={value} picture={picture} />}
            </Loaded>
          ) : (
            <Note title="Not yours to change">The owner or a manager traces a lake’s outline.</Note>
          )
        }
      </Loaded>
    </Page>
  );
}

function Picture({ lake, picture }: { lake: LakeView; picture: LakePictureView | null }) {
  if (!picture)
    return <Empty title="No such picture">It may have been taken away. Go back and choose one.</Empty>;
  if (picture.state === 'waiting') return <Waiting words="The picture is being turned and resized…" />;
  if (picture.state === 'refused')
    return (
      <Note kind="danger" title="This picture was refused">
        {picture.refusal ?? ''}
      </Note>
    );
  return <Ready lake={lake} now={picture} />;
}

function Ready({ lake, now }: { lake: LakeView; now: LakePictureView }) {
  const { held, hold, newer } = useHeld(now);
  const url = usePictureUrl(held, 'large');
  return (
    <>
      {newer ? <NewerNote what="this picture" onTake={() => hold(newer)} /> : null}
      <Loaded query={url} waiting="Fetching the picture…">
        {(address) => <PointsForm key={held.version} lake={lake} picture={held} url={address} />}
      </Loaded>
    </>
  );
}

type FormProps = { lake: LakeView; picture: LakePictureView; url: string };

function PointsForm({ lake, picture, url }: FormProps) {
  const router = useRouter();
  const { id, version } = picture;
  const size = { widthPx: picture.widthPx ?? 1, heightPx: picture.heightPx ?? 1 };
  const [chosen, setChosen] = useState<number | null>(null);
  const form = useDraftForm({
    form: `lake-picture:${id}:${String(version)}`,
    schema: TypedPoints,
    start: draftOf(picture),
    send: (input) => fixLakePicture(id, { ...input, version }),
    onDone: ({ placed }) =>
      router.replace(
        placed ? `/office/lakes/${lake.id}/outline?pictureId=${id}` : `/office/lakes/${lake.id}/pictures`,
      ),
  });
  const { control, formState } = form;
  const points = useController({ control, name: 'points' });
  const fit = useController({ control, name: 'fit' });
  const draft = points.field.value;
  const kind = fit.field.value;
  const fitting = useMemo(
    () => fittingOf({ fit: kind, points: draft }, lake.origin),
    [kind, draft, lake.origin],
  );
  const known = finishedPoints(draft).length;
  const put = (at: number, point: DraftPoint): void =>
    points.field.onChange(draft.map((each, i) => (i === at ? point : each)));
  const point = chosen === null ? undefined : draft[chosen];
  const faults = chosen === null ? undefined : formState.errors.points?.[chosen];
  return (
    <DraftFormFrame
      form={form}
      label="Known points"
      act="Keep the points"
      busyLabel="Keeping…"
      beside={<LinkButton label="Leave it" href={`/office/lakes/${lake.id}/pictures`} />}
    >
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.large }}>
        <View style={{ flexGrow: 3, flexBasis: 340, minWidth: 0, maxWidth: '100%' }}>
          <PictureCanvas
            picture={{ url, ...size }}
            points={draft}
            chosen={chosen}
            onAdd={(xPx, yPx) => {
              points.field.onChange([...draft, { label: '', xPx, yPx, position: '' }]);
              setChosen(draft.length);
            }}
            onChoose={setChosen}
            onMove={(at, xPx, yPx) => {
              const moved = draft[at];
              if (moved) put(at, { ...moved, xPx, yPx });
            }}
          />
        </View>
        <View style={{ flexGrow: 1, flexBasis: 320, gap: space.medium, minWidth: 0 }}>
          <PointList points={draft} chosen={chosen} fitting={fitting} onChoose={setChosen} />
          {point && chosen !== null ? (
            <PointFields
              key={chosen}
              lake={lake}
              at={chosen}
              point={point}
              errors={{ label: faults?.label?.message, position: faults?.position?.message }}
              onChange={(next) => put(chosen, next)}
              onRemove={() => {
                points.field.onChange(draft.filter((_, i) => i !== chosen));
                setChosen(null);
              }}
            />
          ) : null}
          {known >= FEWEST_POINTS.affine || kind === 'affine' ? (
            <ChoiceGrid
              label="How the picture may lie"
              bank={false}
              columns={1}
              choices={FITS}
              value={kind}
              onChange={fit.field.onChange}
            />
          ) : null}
          <FitFound fitting={fitting} enough={known >= FEWEST_POINTS[kind]} size={size} />
        </View>
      </View>
    </DraftFormFrame>
  );
}

const FITS = [
  { key: 'similarity', label: 'Turned and scaled', note: 'taken straight down, as most are' },
  { key: 'affine', label: 'Stretched too', note: 'taken a little aslant; needs four points all round' },
] as const;
