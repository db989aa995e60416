import type { ChartView } from '@mereward/shared/charts/contract';
import { Text } from '@/components/text';
import { TextLink } from '@/components/text-link';
import { Note } from '@/components/note';

/** What must be known of a chart before it is read: it was replaced, withdrawn, or isn't published yet. */
export function VersionNotes({ chart }: { chart: ChartView }) {
  const { status, supersededBy, withdrawnReason } = chart;
  return (
    <>
      {status === 'superseded' && supersededBy ? (
        <Note kind="caution" title="A newer chart replaces this one">
          <Text>
            This is kept for comparison.{' '}
            <TextLink
              href={`/water/charts/${supersededBy.id}`}
            >{`Open chart ${supersededBy.version}`}</TextLink>
          </Text>
        </Note>
      ) : null}
      {status === 'withdrawn' ? (
        <Note kind="danger" title="This chart was withdrawn">
          {withdrawnReason ? `The fishery says: ${withdrawnReason}` : 'Don’t rely on it.'}
        </Note>
      ) : null}
      {status === 'draft' || status === 'submitted' ? (
        <Note kind="caution" title={status === 'draft' ? 'A draft' : 'Waiting for approval'}>
          Only the fishery’s own people see this chart until somebody else approves it.
        </Note>
      ) : null}
    </>
  );
}
