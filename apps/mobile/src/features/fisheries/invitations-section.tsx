import { useState } from 'react';
import { Role, EmailAddress } from '@mereward/shared/accounts/contract';
import type { InvitationView, PeopleView } from '@mereward/shared/fisheries/contract';
import { z } from 'zod';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { Kept } from '@/components/kept';
import { List, Row } from '@/components/list';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { ROLE_WORDS } from '@mereward/shared/accounts/role-words';
import { invite, useWithdrawInvitation } from '@/features/fisheries/office-api';
import { useDraftForm } from '@/hooks/use-draft-form';

const Wanted = z.object({
  email: EmailAddress,
  role: Role,
});

const STATES: Readonly<Record<InvitationView['state'], string>> = {
  waiting: 'waiting for an answer',
  accepted: 'taken up',
  expired: 'ran out',
  withdrawn: 'withdrawn',
};

type Props = { fisheryId: string; people: PeopleView };

/** Invites by mail, shows how each invitation stands, withdraws. */
export function InvitationsSection({ fisheryId, people }: Props) {
  const [doubted, setDoubted] = useState<InvitationView | null>(null);
  const withdraw = useWithdrawInvitation(fisheryId);
  return (
    <Section title="Invitations" note="A link is mailed. It opens for 14 days, and only to that address.">
      {people.invitations.length > 0 ? (
        <List label="Invitations">
          {people.invitations.map((invitation) => (
            <Row
              key={invitation.id}
              title={invitation.email}
              note={`${ROLE_WORDS[invitation.role]} · ${STATES[invitation.state]}`}
              end={
                invitation.state === 'waiting' && people.mayGive.includes(invitation.role) ? (
                  <Button
                    label="Withdraw"
                    kind="quiet"
                    spoken={`Withdraw the invitation of ${invitation.email}`}
                    onPress={() => setDoubted(invitation)}
                  />
                ) : null
              }
            />
          ))}
        </List>
      ) : null}
      <ProblemNote problem={withdraw.error} />
      <InviteForm fisheryId={fisheryId} mayGive={people.mayGive} />
      <Confirm
        open={doubted !== null}
        title="Withdraw this invitation?"
        words={`The link mailed to ${doubted?.email ?? ''} opens nothing any more. You can invite again.`}
        act="Withdraw it"
        danger
        busy={withdraw.isPending}
        onClose={() => setDoubted(null)}
        onAct={() => {
          if (doubted) withdraw.mutate(doubted.id, { onSettled: () => setDoubted(null) });
        }}
      />
    </Section>
  );
}

function InviteForm({ fisheryId, mayGive }: { fisheryId: string; mayGive: readonly Role[] }) {
  const [sent, setSent] = useState<InvitationView | null>(null);
  return (
    <>
      <InviteFields key={sent?.id ?? 'first'} {...{ fisheryId, mayGive }} onSent={setSent} />
      <Kept words={sent ? `${sent.email} is invited as ${ROLE_WORDS[sent.role]}.` : null} />
    </>
  );
}

type FieldsProps = {
  fisheryId: string;
  mayGive: readonly Role[];
  onSent: (invitation: InvitationView) => void;
};

function InviteFields({ fisheryId, mayGive, onSent }: FieldsProps) {
  const [first] = useState<Role>(() => mayGive.find((role) => role === 'bailiff') ?? mayGive[0] ?? 'angler');
  const form = useDraftForm({
    form: `invite:${fisheryId}`,
    schema: Wanted,
    start: { email: '', role: first },
    send: (input) => invite(fisheryId, input),
    onDone: onSent,
  });
  return (
    <DraftFormFrame form={form} label="Invite" act="Send the invitation" busyLabel="Sending…">
      <FormField control={form.control} name="email" label="E-mail" keypad="email" />
      <FormSelect
        control={form.control}
        name="role"
        label="As"
        choices={mayGive.map((role) => ({ key: role, label: ROLE_WORDS[role] }))}
      />
    </DraftFormFrame>
  );
}
