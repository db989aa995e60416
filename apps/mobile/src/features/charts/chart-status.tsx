import type { ChartStatus } from '@mereward/shared/charts/contract';
import { StatusShape } from '@/components/status-shape';

/** A chart's state as a shape and a word. */
export function ChartStatusShape({ status }: { status: ChartStatus }) {
  switch (status) {
    case 'draft':
      return <StatusShape shape="ring" tone="inkSoft" word="draft" />;
    case 'submitted':
      return <StatusShape shape="diamond" tone="amber" word="waits for approval" />;
    case 'published':
      return <StatusShape shape="triangle" tone="reed" word="published" />;
    case 'superseded':
      return <StatusShape shape="bar" tone="inkSoft" word="superseded" />;
    case 'withdrawn':
      return <StatusShape shape="cross" tone="brick" word="withdrawn" />;
  }
}
