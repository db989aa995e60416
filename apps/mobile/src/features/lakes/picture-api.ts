import {
  LakePictureList,
  LakePictureView,
  type FixLakePicture,
} from '@mereward/shared/lakes/picture-contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { api, nothing } from '@/lib/api';
import { dataUrlOf } from '@/lib/data-url';
import type { PickedPicture } from '@/lib/picked';
import { queryClient } from '@/lib/queries';
import { sendFile } from '@/lib/send-file';

const keys = {
  ofLake: (lakeId: string) => ['lakes', lakeId, 'pictures'] as const,
  bytes: (pictureId: string, size: string) => ['lakes', 'picture', pictureId, size] as const,
};

const EVERY_MS = 1500;

/** A lake's pictures to trace over; read again while one of them is being made ready. */
export const useLakePictures = (lakeId: string, wanted = true) =>
  useQuery({
    queryKey: keys.ofLake(lakeId),
    queryFn: ({ signal }) => api.get(`/lakes/${lakeId}/pictures`, LakePictureList, signal),
    enabled: wanted && lakeId !== '',
    refetchInterval: ({ state }) =>
      state.data?.pictures.some((picture) => picture.state === 'waiting') ? EVERY_MS : false,
  });

/** The picture itself as something an image can show. It needs the reader's sign-in, so no plain address will do. */
export const usePictureUrl = (picture: LakePictureView | null, size: 'small' | 'large') =>
  useQuery({
    queryKey: keys.bytes(picture?.id ?? '', size),
    queryFn: async () => dataUrlOf(await api.file(`/pictures/${picture?.id ?? ''}/${size}.jpg`)),
    enabled: picture?.state === 'ready',
    staleTime: Infinity, // it never changes under its id
    meta: { keep: false },
  });

const kept = (picture: LakePictureView): LakePictureView => {
  void queryClient.invalidateQueries({ queryKey: keys.ofLake(picture.lakeId) });
  return picture;
};

type Sending = {
  lakeId: string;
  id: string;
  caption: string;
  picture: PickedPicture;
  onShare: (share: number) => void;
};

export async function sendLakePicture({ lakeId, id, caption, picture, onShare }: Sending) {
  const form = new FormData();
  form.append('id', id); // fields before the file, so that they are read when it comes in
  form.append('caption', caption);
  form.append('picture', picture.file, picture.name);
  return kept(await sendFile({ path: `/lakes/${lakeId}/pictures`, form, schema: LakePictureView, onShare }));
}

export const fixLakePicture = async (pictureId: string, input: FixLakePicture) =>
  kept(await api.put(`/pictures/${pictureId}/points`, input, LakePictureView));

export const useRemoveLakePicture = (lakeId: string) =>
  useMutation({
    mutationFn: (pictureId: string) => api.del(`/pictures/${pictureId}`, nothing),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: keys.ofLake(lakeId) }),
  });
