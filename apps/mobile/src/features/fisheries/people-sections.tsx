import { useState } from 'react';
import type { PeopleView, PersonView } from '@mereward/shared/fisheries/contract';
import { Button } from '@/components/button';
import { Loaded } from '@/components/loaded';
import { List, Row } from '@/components/list';
import { Section } from '@/components/section';
import { ROLE_WORDS } from '@mereward/shared/accounts/role-words';
import { InvitationsSection } from '@/features/fisheries/invitations-section';
import { usePeople } from '@/features/fisheries/office-api';
import { RolesSheet } from '@/features/fisheries/roles-sheet';

/** Everybody with a role at the fishery, and who is invited. */
export function PeopleSections({ fisheryId }: { fisheryId: string }) {
  const people = usePeople(fisheryId);
  return (
    <Loaded query={people} waiting="Reading the people…">
      {(value) => (
        <>
          <PeopleList fisheryId={fisheryId} people={value} />
          {value.mayGive.length > 0 ? <InvitationsSection fisheryId={fisheryId} people={value} /> : null}
        </>
      )}
    </Loaded>
  );
}

function PeopleList({ fisheryId, people }: { fisheryId: string; people: PeopleView }) {
  const [chosen, setChosen] = useState<PersonView | null>(null);
  return (
    <Section title="People" note="A role holds at this fishery only. One person may hold several." bare>
      <List label="People and their roles">
        {people.people.map((person) => (
          <Row
            key={person.accountId}
            title={person.name}
            note={`${person.email} · ${person.roles.map((role) => ROLE_WORDS[role]).join(', ')}`}
            end={
              people.mayGive.length > 0 ? (
                <Button
                  label="Roles"
                  spoken={`Roles of ${person.name}: change them`}
                  onPress={() => setChosen(person)}
                />
              ) : null
            }
          />
        ))}
      </List>
      {chosen ? (
        <RolesSheet
          fisheryId={fisheryId}
          person={chosen}
          mayGive={people.mayGive}
          onClose={() => setChosen(null)}
        />
      ) : null}
    </Section>
  );
}
