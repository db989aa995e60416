import { PhotoView } from '@mereward/shared/files/contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';
import { sendFile } from '@/lib/send-file';
import type { PickedPicture } from '@/lib/picked';

/** What a photo is of. */
export type PhotoSubject = { kind: 'pegs' | 'marks'; id: string };

export type NewPhoto = { id: string; caption: string; takenOn: string | null; picture: PickedPicture };

type Sending = { subject: PhotoSubject; photo: NewPhoto; onShare: (share: number) => void };

export function sendPhoto({ subject, photo, onShare }: Sending): Promise<PhotoView> {
  const form = new FormData();
  form.append('id', photo.id); // fields before the file, so that they are read when it comes in
  form.append('caption', photo.caption);
  form.append('takenOn', photo.takenOn ?? '');
  form.append('photo', photo.picture.file, photo.picture.name);
  return sendFile({ path: `/${subject.kind}/${subject.id}/photos`, form, schema: PhotoView, onShare });
}

const EVERY_MS = 1500;

/** How a photo that is being worked on stands. */
export const usePhoto = (photo: PhotoView) =>
  useQuery({
    queryKey: ['files', 'photo', photo.id],
    queryFn: ({ signal }) => api.get(`/photos/${photo.id}`, PhotoView, signal),
    initialData: photo,
    initialDataUpdatedAt: 0,
    enabled: photo.state === 'waiting',
    refetchInterval: ({ state }) => (state.data?.state === 'waiting' ? EVERY_MS : false),
    meta: { keep: false },
  });

/** Takes a photo away; `alsoRead` is what shows it. */
export const useRemovePhoto = (alsoRead: readonly unknown[]) =>
  useMutation({
    mutationFn: (photoId: string) => api.del(`/photos/${photoId}`, nothing),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: alsoRead }),
  });
