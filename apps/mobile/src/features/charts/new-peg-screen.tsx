import { useRouter } from 'expo-router';
import { LinkButton } from '@/components/link-button';
import { OfficeLakePage } from '@/features/charts/office-lake-page';
import { PegFieldsForm } from '@/features/charts/peg-fields-form';

/** Makes a peg: it comes last in walking order. */
export function NewPegScreen() {
  const router = useRouter();
  return (
    <OfficeLakePage title="A new peg" may="changePegs">
      {(lake) => (
        <PegFieldsForm
          lake={lake}
          peg={null}
          onDone={({ id }) => router.replace(`/office/lakes/${lake.id}/pegs/${id}`)}
          beside={<LinkButton label="Leave it" href={`/office/lakes/${lake.id}`} />}
        />
      )}
    </OfficeLakePage>
  );
}
