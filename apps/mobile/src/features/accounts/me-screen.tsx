import { ChoiceGrid } from '@/components/choice-grid';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { themeChoice } from '@/hooks/use-theme';

const themes = [
  { key: 'device', label: 'As this device' },
  { key: 'light', label: 'Light' },
  { key: 'dusk', label: 'Dusk' },
] as const;

/** Who is here, and how this device shows things. */
export function MeScreen() {
  const theme = themeChoice.use();
  return (
    <Page title="Me">
      <Section title="On this device" bare>
        <ChoiceGrid label="Paper" choices={themes} value={theme} onChange={themeChoice.set} />
      </Section>
    </Page>
  );
}
