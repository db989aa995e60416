import { useEffect, useRef, type CSSProperties } from 'react';
import type { OverlayProps } from '@/components/overlay-props';
import { radius, space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';
import { useWide } from '@/hooks/use-wide';

function placed(place: OverlayProps['place'], wide: boolean): CSSProperties {
  if (place === 'middle')
    return {
      margin: 'auto',
      width: 'min(460px, calc(100vw - 32px))',
      maxHeight: '90dvh',
      borderRadius: radius.sheet,
    };
  return wide
    ? { margin: '0 0 0 auto', width: 420, maxWidth: '90vw', height: '100dvh', maxHeight: '100dvh' }
    : {
        margin: 'auto 0 0 0',
        width: '100vw',
        maxWidth: '100vw',
        maxHeight: '86dvh',
        borderRadius: `${String(radius.sheet)}px ${String(radius.sheet)}px 0 0`,
      };
}

/** What lies over the page and holds the focus until it is closed: the browser's own dialog. Screens use `Sheet` or `Confirm`. */
export function Overlay({ open, onClose, title, place, children }: OverlayProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const { colours } = useTheme();
  const wide = useWide();
  useEffect(() => {
    const box = dialog.current;
    if (!open || !box) return undefined;
    const cameFrom = document.activeElement;
    box.showModal();
    return () => {
      box.close();
      if (cameFrom instanceof HTMLElement) cameFrom.focus(); // the box is gone by now and can't hand it back itself
    };
  }, [open]);
  if (!open) return null;
  return (
    <dialog
      ref={dialog}
      aria-label={title}
      className={`overlay overlay-${place === 'edge' && wide ? 'side' : place}`}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
      onClick={(event) => {
        if (event.target === event.currentTarget) onClose(); // a press on the darkened page around it
      }}
      style={{
        ...placed(place, wide),
        boxSizing: 'border-box',
        padding: 0,
        border: 'none',
        overflow: 'auto',
        color: colours.ink,
        backgroundColor: colours.sheet,
      }}
    >
      <div style={{ display: 'flex', flexDirection: 'column', gap: space.medium, padding: space.page }}>
        {children}
      </div>
    </dialog>
  );
}
