import { usePathname } from 'expo-router';
import { View } from 'react-native';
import { PressLink } from '@/components/press-link';
import { Shape } from '@/components/shape';
import { Text } from '@/components/text';
import { space, target } from '@/constants/layout';
import { useNoSignal } from '@/hooks/use-no-signal';
import { useTheme } from '@/hooks/use-theme';
import { clockHere } from '@/lib/format-time';
import { useOutbox } from '@/lib/outbox';
import { outboxSignal } from '@/lib/outbox-signal';
import { standing } from '@/lib/outbox-words';

/** How sending stands: always on the bank, elsewhere when something waits or was refused. Opens the list. */
export function OutboxLine() {
  const { colours } = useTheme();
  const path = usePathname();
  const { entries, others, locked } = useOutbox();
  const noSignal = useNoSignal();
  const lastSent = outboxSignal.useLastSent();
  const waiting = entries.filter(({ state }) => state === 'waiting').length;
  const refused = entries.filter(({ state }) => state === 'refused').length;
  const onBank = /^\/bank\b/.test(path);
  if (path === '/waiting' || (!onBank && waiting + refused + others + locked === 0)) return null;
  const stands = standing({
    waiting,
    refused,
    others,
    locked,
    noSignal,
    lastSent: lastSent === '' ? '' : clockHere(lastSent),
  }) ?? { words: 'Nothing waits to be sent', tone: 'inkSoft', shape: 'triangle' };
  return (
    <View role="region" aria-label="Sending">
      <PressLink
        href="/waiting"
        style={{
          minHeight: target.plain,
          paddingHorizontal: space.page,
          flexDirection: 'row',
          alignItems: 'center',
          gap: space.small,
          borderTopWidth: 1,
          borderTopColor: colours.rule,
          backgroundColor: colours.sheet,
        }}
      >
        <Shape name={stands.shape} colour={colours[stands.tone]} />
        <Text role="status" size="small" weight="semibold" tone={stands.tone} style={{ flex: 1 }}>
          {stands.words}
        </Text>
        <Text size="small" tone="water">
          Look
        </Text>
      </PressLink>
    </View>
  );
}
