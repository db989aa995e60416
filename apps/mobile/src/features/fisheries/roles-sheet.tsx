import { useState } from 'react';
import type { Role } from '@mereward/shared/accounts/contract';
import type { PersonView } from '@mereward/shared/fisheries/contract';
import { Button } from '@/components/button';
import { ManyChoiceGrid } from '@/components/choice-grid';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Sheet } from '@/components/sheet';
import { Text } from '@/components/text';
import { ROLE_WORDS } from '@mereward/shared/accounts/role-words';
import { useSetRoles } from '@/features/fisheries/office-api';

const ROLE_NOTES: Readonly<Record<Role, string>> = {
  owner: 'everything, and the owners',
  manager: 'lakes, pegs, people, approves charts',
  head_bailiff: 'pegs, surveys, builds charts',
  bailiff: 'surveys, levels, checks tickets',
  office: 'tickets and members',
  member: 'reads what members may',
  angler: 'visits with a ticket',
};

type Props = {
  fisheryId: string;
  person: PersonView;
  mayGive: readonly Role[];
  onClose: () => void;
};

/** Gives and takes one person's roles. What the reader may not give stays as it is. */
export function RolesSheet({ fisheryId, person, mayGive, onClose }: Props) {
  const fixed = person.roles.filter((role) => !mayGive.includes(role));
  const [chosen, setChosen] = useState(() => person.roles.filter((role) => mayGive.includes(role)));
  const setRoles = useSetRoles(fisheryId);
  const roles = [...fixed, ...chosen];
  return (
    <Sheet open onClose={onClose} title={`Roles of ${person.name}`}>
      {fixed.length > 0 ? (
        <Text tone="inkSoft">{`Stays ${fixed.map((role) => ROLE_WORDS[role]).join(' and ')}: only an owner changes that.`}</Text>
      ) : null}
      <ManyChoiceGrid
        label="Roles"
        choices={mayGive.map((role) => ({ key: role, label: ROLE_WORDS[role], note: ROLE_NOTES[role] }))}
        values={chosen}
        onChange={setChosen}
        columns={2}
        bank={false}
      />
      {roles.length === 0 ? (
        <Note kind="caution" title="Without a role this person is out">
          They no longer see anything of this fishery that is not open to everybody. To have them back, invite
          them.
        </Note>
      ) : null}
      <ProblemNote problem={setRoles.error} />
      <Button
        label={roles.length === 0 ? 'Take the person out' : 'Keep these roles'}
        kind={roles.length === 0 ? 'danger' : 'main'}
        busy={setRoles.isPending}
        busyLabel="Keeping…"
        onPress={() => setRoles.mutate({ accountId: person.accountId, roles }, { onSuccess: onClose })}
      />
    </Sheet>
  );
}
