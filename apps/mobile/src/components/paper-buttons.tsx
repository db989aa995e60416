import { useState } from 'react';
import { Button } from '@/components/button';
import { ProblemNote } from '@/components/problem-note';
import { savePaper } from '@/lib/save-paper';

/** A file the server makes: what it is, where it is asked for, and what it is saved as. */
export type Paper = { label: string; path: string; name: string };

/** One button for each paper; while one is made the others wait for nothing. */
export function PaperButtons({ papers }: { papers: readonly Paper[] }) {
  const [busy, setBusy] = useState<string | null>(null);
  const [problem, setProblem] = useState<unknown>(null);
  const save = async ({ path, name }: Paper): Promise<void> => {
    setBusy(path);
    setProblem(null);
    try {
      await savePaper(path, name);
    } catch (fault) {
      setProblem(fault);
    } finally {
      setBusy(null);
    }
  };
  return (
    <>
      {papers.map((paper) => (
        <Button
          key={paper.path}
          label={paper.label}
          busy={busy === paper.path}
          busyLabel="Making it…"
          onPress={() => void save(paper)}
        />
      ))}
      <ProblemNote problem={problem} />
    </>
  );
}
