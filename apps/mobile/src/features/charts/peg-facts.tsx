import type { PegDetails } from '@mereward/shared/lakes/contract';
import { pegFacts, wayFacts } from '@mereward/shared/lakes/peg-facts';
import { Facts } from '@/components/facts';
import { Section } from '@/components/section';
import { useUnits } from '@/hooks/use-units';

/** The way to the peg, and where to leave the car. */
export function GettingThere({ details }: { details: PegDetails }) {
  return (
    <Section title="Getting there">
      <Facts facts={wayFacts(details)} />
    </Section>
  );
}

/** The peg itself: whose water, what to stand on, how many, what tackle. */
export function ThePeg({ details }: { details: PegDetails }) {
  const units = useUnits();
  return (
    <Section title="The peg">
      <Facts facts={pegFacts(details, units)} />
    </Section>
  );
}
