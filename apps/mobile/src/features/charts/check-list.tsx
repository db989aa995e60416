import type { CheckView } from '@mereward/shared/charts/contract';
import { List, Row } from '@/components/list';
import { StatusShape } from '@/components/status-shape';

/** The checks a program can make, each with what it found, in words. */
export function CheckList({ checks }: { checks: readonly CheckView[] }) {
  return (
    <List label="Checks">
      {checks.map((check) => (
        <Row
          key={check.key}
          title={check.words}
          {...(check.state === 'failed' && check.blocks ? { note: 'Stands against publishing' } : {})}
          end={<CheckState state={check.state} />}
        />
      ))}
    </List>
  );
}

function CheckState({ state }: Pick<CheckView, 'state'>) {
  switch (state) {
    case 'passed':
      return <StatusShape shape="dot" tone="reed" word="passed" />;
    case 'warning':
      return <StatusShape shape="diamond" tone="amber" word="look again" />;
    case 'failed':
      return <StatusShape shape="cross" tone="brick" word="failed" />;
  }
}
