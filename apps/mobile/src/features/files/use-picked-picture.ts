import { useState } from 'react';
import { PHOTO_MOST_BYTES } from '@mereward/shared/files/contract';
import { useMutation } from '@tanstack/react-query';
import { pickPicture, shrunk } from '@/features/files/pick-picture';
import { newId } from '@/lib/new-id';
import type { PickedPicture } from '@/lib/picked';

/** What goes with a sending: the picture's own id, the same at every try, and who hears how much has gone (0 to 1). */
export type Sending = { id: string; picture: PickedPicture; onShare: (share: number) => void };

type Wishes = {
  /** What the longer side becomes before it is sent, px; the usual when not said. */
  longestPx?: number;
  send: (sending: Sending) => Promise<unknown>;
  /** It has come: the form starts afresh. */
  onSent: () => Promise<void> | void;
};

/** One picture from being chosen to having come: each chosen one has an id of its own, so a repeat is kept once. */
export function usePickedPicture({ longestPx, send, onSent }: Wishes) {
  const [picture, setPicture] = useState<PickedPicture | null>(null);
  const [id, setId] = useState(newId);
  const [share, setShare] = useState(0);
  const sending = useMutation({
    mutationFn: (chosen: PickedPicture) => send({ id, picture: chosen, onShare: setShare }),
    onSuccess: () => {
      setPicture(null);
      setShare(0);
      setId(newId());
      return onSent();
    },
  });
  const picking = useMutation({
    mutationFn: async () => {
      const chosen = await pickPicture();
      return chosen && shrunk(chosen, longestPx);
    },
    onSuccess: (chosen) => {
      if (!chosen) return;
      sending.reset();
      setId(newId());
      setPicture(chosen);
    },
  });
  const tooLarge = picture !== null && picture.file.size > PHOTO_MOST_BYTES;
  return {
    picture,
    tooLarge,
    share,
    picking: { busy: picking.isPending, problem: picking.error, start: () => picking.mutate() },
    sending: {
      busy: sending.isPending,
      problem: sending.error,
      start: () => {
        if (picture && !tooLarge && !sending.isPending) sending.mutate(picture);
      },
    },
  };
}
