import type { PegPageView } from '@mereward/shared/charts/contract';
import type { PegDetails } from '@mereward/shared/lakes/contract';
import { emergencyFacts } from '@mereward/shared/lakes/peg-facts';
import { Facts } from '@/components/facts';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';

/** What to say and where to go when something has happened here; kept with the page for when there's no signal. */
export function PegEmergency({ page, details }: { page: PegPageView; details: PegDetails | null }) {
  return (
    <Section title="In an emergency">
      <Note kind="danger" title="Ring 999 or 112">
        <Text>{page.emergencyWords}</Text>
        {details?.emergency.sayThis ? (
          <Text weight="semibold">{`Say: “${details.emergency.sayThis}”`}</Text>
        ) : null}
      </Note>
      <Facts facts={emergencyFacts(page, details?.emergency ?? null)} />
    </Section>
  );
}
