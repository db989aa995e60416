import type { ReactNode } from 'react';
import { Link, type Href } from 'expo-router';
import { View } from 'react-native';
import { Heading } from '@/components/heading';
import { Text } from '@/components/text';
import { space, target } from '@/constants/layout';
import { typeOf } from '@/constants/type';
import { useArrivalFocus } from '@/hooks/use-arrival-focus';
import { useTheme } from '@/hooks/use-theme';

export type PageHeadProps = {
  title: string;
  /** The small line over the title: where this belongs. */
  over?: string | undefined;
  /** The small line under the title. */
  under?: string | undefined;
  /** The way up: "Far Ostle", not "Back". */
  back?: { label: string; href: Href } | undefined;
  /** Stands at the right of the title: a `StatusShape`, a button. */
  end?: ReactNode;
  path: string;
};

/** Title, where it belongs, the way up. The heading takes the focus when the reader arrives. */
export function PageHead({ title, over, under, back, end, path }: PageHeadProps) {
  const { colours } = useTheme();
  const heading = useArrivalFocus(path);
  return (
    <View style={{ paddingTop: back ? space.hair : space.page, paddingBottom: space.page }}>
      {back ? (
        <Link
          href={back.href}
          style={[
            typeOf('small', 'semibold'),
            {
              color: colours.water,
              lineHeight: target.plain,
              alignSelf: 'flex-start',
              paddingRight: space.page,
            },
          ]}
        >
          <Text aria-hidden size="small" tone="water">
            {'‹ '}
          </Text>
          {back.label}
        </Link>
      ) : null}
      {over ? (
        <Text size="small" tone="inkSoft">
          {over}
        </Text>
      ) : null}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', alignItems: 'center', columnGap: space.page }}>
        <Heading level={1} ref={heading} {...{ tabIndex: -1 }} style={{ flexGrow: 1, flexShrink: 1 }}>
          {title}
        </Heading>
        {end}
      </View>
      {under ? (
        <Text size="small" tone="inkSoft">
          {under}
        </Text>
      ) : null}
    </View>
  );
}
