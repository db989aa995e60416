import { Linking } from 'react-native';
import { Button } from '@/components/button';
import { Section } from '@/components/section';
import { Text } from '@/components/text';

/** The address on the peg's card, to read out or send on: a page of words that any phone opens at once. */
export function ShortAddress({ url }: { url: string }) {
  return (
    <Section
      title="To read out or send on"
      note="A light page of this peg, open to everybody, for an old phone or one bar of signal. It is on the peg’s card too."
    >
      <Text selectable weight="semibold">
        {url.replace(/^https?:\/\//, '')}
      </Text>
      <Button label="Open the light page" onPress={() => void Linking.openURL(url)} />
    </Section>
  );
}
