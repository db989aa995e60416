import { useEffect } from 'react';
import { plainWords } from '@mereward/shared/problems/plain-words';
import { PersistQueryClientProvider } from '@tanstack/react-query-persist-client';
import { Slot } from 'expo-router';
import { View } from 'react-native';
import { z } from 'zod';
import { SafeAreaProvider, SafeAreaView } from 'react-native-safe-area-context';
import { NewerProgramLine } from '@/components/newer-program-line';
import { OutboxLine } from '@/components/outbox-line';
import { Places } from '@/components/places';
import { SkipLink } from '@/components/skip-link';
import { placesFor } from '@/constants/places';
import { useTheme } from '@/hooks/use-theme';
import { useWide } from '@/hooks/use-wide';
import { useFaces } from '@/lib/faces';
import { programVersion } from '@/lib/program-version';
import { watchOutbox } from '@/lib/outbox-watch';
import { persistence, queryClient } from '@/lib/queries';
import { resumeSession, useSession } from '@/lib/session';
import { useStampedTheme } from '@/lib/stamp-theme';

// Compiling schemas needs eval, which the page's content policy forbids; asking for it would only be refused.
z.config({ jitless: true, customError: plainWords });

export { PageFault as ErrorBoundary } from '@/components/page-fault';

function Ground() {
  const { name, colours } = useTheme();
  const wide = useWide();
  const { roles } = useSession();
  useStampedTheme(name);
  const places = <Places places={placesFor(roles)} wide={wide} />;
  return (
    <SafeAreaView style={{ flex: 1, flexDirection: wide ? 'row' : 'column', backgroundColor: colours.paper }}>
      <SkipLink />
      {wide ? places : null}
      <View style={{ flex: 1, minWidth: 0, minHeight: 0 }}>
        <Slot />
        <NewerProgramLine />
        <OutboxLine />
      </View>
      {wide ? null : places}
    </SafeAreaView>
  );
}

export default function RootLayout() {
  const faces = useFaces();
  useEffect(() => {
    watchOutbox();
    programVersion.watch();
    void resumeSession();
  }, []);
  if (!faces) return null;
  return (
    <SafeAreaProvider>
      <PersistQueryClientProvider client={queryClient} persistOptions={persistence}>
        <Ground />
      </PersistQueryClientProvider>
    </SafeAreaProvider>
  );
}
