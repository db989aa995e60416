import type { ErrorBoundaryProps } from 'expo-router';
import { Button } from '@/components/button';
import { LinkButton } from '@/components/link-button';
import { Page } from '@/components/page';
import { Note } from '@/components/note';

/** Shown in place of a screen that broke. What was typed is still kept by its form. */
export function PageFault({ retry }: ErrorBoundaryProps) {
  return (
    <Page title="This page broke">
      <Note kind="danger" title="Something in this page failed" live>
        What you typed is kept on this device. Try the page again; if it breaks again, go back to the water
        and tell the fishery what you were doing.
      </Note>
      <Button label="Try again" kind="main" onPress={() => void retry()} />
      <LinkButton label="To the water" href="/water" />
    </Page>
  );
}
