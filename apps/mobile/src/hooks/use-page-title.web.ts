import { useEffect } from 'react';

/** Names the browser's tab, and with it the page in history and to a screen reader. */
export function usePageTitle(title: string): void {
  useEffect(() => {
    document.title = title ? `${title} · Mereward` : 'Mereward';
  }, [title]);
}
