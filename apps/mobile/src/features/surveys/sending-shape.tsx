import { StatusShape } from '@/components/status-shape';
import type { Standing } from '@/features/surveys/shown-visit';

/** Whether something is on the server yet, by shape and word. */
export function SendingShape({ standing }: { standing: Standing | null }) {
  switch (standing) {
    case 'waiting':
      return <StatusShape shape="ring" tone="amber" word="waiting to be sent" size="small" />;
    case 'refused':
      return <StatusShape shape="cross" tone="brick" word="refused" size="small" />;
    case null:
      return <StatusShape shape="triangle" tone="reed" word="sent" size="small" />;
  }
}
