import type { ReactNode } from 'react';

export type OverlayProps = {
  open: boolean;
  onClose: () => void;
  title: string;
  /** `edge`: from below on a phone, from the right on a wide screen. `middle`: a small box in the middle. */
  place: 'edge' | 'middle';
  children: ReactNode;
};
