import { useState } from 'react';
import { Button } from '@/components/button';
import { ProblemNote } from '@/components/problem-note';
import { openCard } from './open-card';

type Props = { pegId: string; number: string; grow?: boolean | undefined };

/** The peg's card to print or keep, with what this reader may see on it. */
export function CardButton({ pegId, number, grow }: Props) {
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<unknown>(null);
  const open = async (): Promise<void> => {
    setBusy(true);
    setProblem(null);
    try {
      await openCard(pegId, number);
    } catch (fault) {
      setProblem(fault);
    } finally {
      setBusy(false);
    }
  };
  return (
    <>
      <Button
        label="Peg card (PDF)"
        busy={busy}
        busyLabel="Printing it…"
        grow={grow}
        onPress={() => void open()}
      />
      <ProblemNote problem={problem} />
    </>
  );
}
