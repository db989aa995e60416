import { usePathname } from 'expo-router';
import { View } from 'react-native';
import { Problem } from '@mereward/shared/problems/problem';
import { Button } from '@/components/button';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { problemWords } from '@/components/problem-words';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';

type Props = {
  /** What was thrown; null or undefined shows nothing. */
  problem: unknown;
  onRetry?: (() => void) | undefined;
};

/** What went wrong, what was kept and what to do, said aloud as it appears. */
export function ProblemNote({ problem, onRetry }: Props) {
  const path = usePathname();
  if (problem === null || problem === undefined) return null;
  const { title, whatToDo } = problemWords(problem);
  const known = problem instanceof Problem ? problem : undefined;
  return (
    <Note kind="danger" title={title} live>
      <Text>{whatToDo}</Text>
      {known?.errors.map((error) => (
        <Text key={error.pointer + error.detail} size="small">
          {error.detail}
        </Text>
      ))}
      {known?.kind === 'internal' && known.instance ? (
        <Text size="small" tone="inkSoft">
          Reference {known.instance}
        </Text>
      ) : null}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        {onRetry ? <Button label="Try again" onPress={onRetry} /> : null}
        {known?.kind === 'not-signed-in' && path !== '/sign-in' ? (
          <LinkButton label="Sign in" href={`/sign-in?next=${encodeURIComponent(path)}`} />
        ) : null}
      </View>
    </Note>
  );
}
