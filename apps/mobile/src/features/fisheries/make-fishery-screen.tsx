import { useState } from 'react';
import { useRouter } from 'expo-router';
import { FormProvider } from 'react-hook-form';
import { z } from 'zod';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Page } from '@/components/page';
import { newFishery, TypedFishery } from '@/features/fisheries/fishery-fields';
import { FisheryForm } from '@/features/fisheries/fishery-form';
import { makeFishery } from '@/features/fisheries/office-api';
import { useDraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';
import { useSession } from '@/lib/session';

const Wanted = z.object({ details: TypedFishery });

/** Makes a fishery; whoever makes it is its owner. */
export function MakeFisheryScreen() {
  const { account } = useSession();
  return (
    <Page
      title="Make a fishery"
      under="For whoever owns or runs a water. You will be its owner here and can invite the others."
      back={{ label: 'Me', href: '/me' }}
    >
      {account ? (
        <MakeFisheryForm />
      ) : (
        <Empty
          title="Sign in first"
          action={<LinkButton label="Sign in" href="/sign-in?next=%2Fme%2Ffishery" kind="main" />}
        >
          A fishery belongs to somebody: sign in, or make an account.
        </Empty>
      )}
    </Page>
  );
}

function MakeFisheryForm() {
  const router = useRouter();
  const [id] = useState(newId);
  const [zone] = useState(() => Intl.DateTimeFormat().resolvedOptions().timeZone);
  const form = useDraftForm({
    form: 'fishery:new',
    schema: Wanted,
    start: { details: newFishery(zone) },
    send: ({ details }) => makeFishery({ id, details }),
    onDone: () => router.replace('/office'),
  });
  return (
    <FormProvider {...form}>
      <DraftFormFrame form={form} label="Make a fishery" act="Make the fishery" busyLabel="Making it…">
        <FisheryForm />
      </DraftFormFrame>
    </FormProvider>
  );
}
