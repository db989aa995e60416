import { useMemo, useState } from 'react';
import type { LakePictureView } from '@mereward/shared/lakes/picture-contract';
import { RMS_LIMIT_M } from '@mereward/shared/lakes/picture-placing';
import { View } from 'react-native';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Select } from '@/components/select';
import { Stepper } from '@/components/stepper';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import type { Backdrop } from '@/features/charts/picture-backdrop';
import { useLakePictures, usePictureUrl } from '@/features/lakes/picture-api';
import { useUnits } from '@/hooks/use-units';
import { length } from '@/lib/format';

const NONE = 'none';
const FIRST_PERCENT = 80;
const named = ({ caption, id }: LakePictureView): string => caption || `Picture ${id.slice(0, 4)}`;

/** The picture an outline is traced over: which of those that are placed, and how strongly it shows. */
export function useOutlineBackdrop(lakeId: string, asked: string | undefined) {
  const pictures = useLakePictures(lakeId);
  const placed = useMemo(
    () => (pictures.data?.pictures ?? []).filter((picture) => picture.placed !== null),
    [pictures.data],
  );
  const [picked, setPictureId] = useState<string | null>(null);
  const pictureId = picked ?? asked ?? NONE;
  const [percent, setPercent] = useState<number | null>(FIRST_PERCENT);
  const picture = placed.find(({ id }) => id === pictureId) ?? null;
  const url = usePictureUrl(picture, 'large');
  const opacity = Math.min(100, Math.max(0, percent ?? FIRST_PERCENT)) / 100;
  const backdrop = useMemo<Backdrop | undefined>(() => {
    const { placed: lies, widthPx = null, heightPx = null } = picture ?? {};
    if (!url.data || !lies || widthPx === null || heightPx === null) return undefined;
    return { url: url.data, widthPx, heightPx, transform: lies.transform, opacity };
  }, [picture, url.data, opacity]);
  return { lakeId, placed, picture, url, backdrop, setPictureId, percent, setPercent };
}

/** Chooses the picture, and says how well it is placed. */
export function BackdropChoice({ of }: { of: ReturnType<typeof useOutlineBackdrop> }) {
  const units = useUnits();
  const { lakeId, placed, picture, url } = of;
  const rmsM = picture?.placed?.rmsM ?? null;
  return (
    <View style={{ gap: space.small }}>
      {placed.length > 0 ? (
        <Select
          label="Trace over a picture"
          choices={[
            { key: NONE, label: 'No picture' },
            ...placed.map((each) => ({ key: each.id, label: named(each) })),
          ]}
          value={picture ? picture.id : NONE}
          onChange={of.setPictureId}
        />
      ) : null}
      {picture ? (
        <Stepper
          label="How strongly it shows"
          unit="%"
          value={of.percent}
          onChange={of.setPercent}
          min={10}
          max={100}
          step={10}
        />
      ) : null}
      {picture && url.isPending ? <Text tone="inkSoft">Fetching the picture…</Text> : null}
      <ProblemNote problem={url.error} />
      {picture && rmsM !== null ? (
        rmsM > RMS_LIMIT_M || picture.points.length < 3 ? (
          <Note kind="caution" title={`Its known points are missed by ${length(rmsM, units, 2)} (RMS)`}>
            {picture.points.length < 3
              ? 'Two points always fit: nothing checks how it lies. Give it a third before you trace by it.'
              : 'A shore traced over it is no better than that. Look at its known points first.'}
          </Note>
        ) : (
          <Text tone="inkSoft">
            {`Its ${String(picture.points.length)} known points are missed by ${length(rmsM, units, 2)} (RMS): a traced shore is no better than that. Trace where the water meets the ground, not the trees over it.`}
          </Text>
        )
      ) : null}
      <View style={{ alignItems: 'flex-start' }}>
        <LinkButton
          label={placed.length > 0 ? 'Pictures to trace over' : 'Trace it over a picture'}
          href={`/office/lakes/${lakeId}/pictures`}
        />
      </View>
    </View>
  );
}
