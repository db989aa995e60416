import type { LogFault, LogReport } from '@mereward/shared/surveys/log-contract';
import { useState } from 'react';
import { Button } from '@/components/button';
import { Facts } from '@/components/facts';
import { List, Row } from '@/components/list';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { GradeShape } from '@/features/surveys/grade-shape';
import { countWords } from '@/features/surveys/visit-words';
import { useUnits } from '@/hooks/use-units';
import { csvOf } from '@/lib/csv';
import { dayAndTime } from '@/lib/format-time';
import { figure, length } from '@/lib/format';
import { saveText } from '@/lib/save-file';

/** What is in the files, what is taken of it and what is not, each with its reason. */
export function LogReportPart({ report, zone }: { report: LogReport; zone: string }) {
  const units = useUnits();
  const { from, to, shallowestM, deepestM } = report;
  const span =
    from === null || to === null ? 'no times' : `${dayAndTime(from, zone)} to ${dayAndTime(to, zone)}`;
  const depths =
    shallowestM === null || deepestM === null
      ? ''
      : `${length(shallowestM, units, 2)} to ${length(deepestM, units, 2)} below the water of that day`;
  return (
    <>
      {report.cautions.map((words) => (
        <Note key={words} kind="caution">
          {words}
        </Note>
      ))}
      <Facts
        facts={[
          ...report.files.map(({ name, words }) => ({ term: name, fact: words })),
          { term: 'Soundings found', fact: figure(report.found) },
          { term: 'Taken', fact: figure(report.kept) },
          { term: 'Made', fact: span },
          { term: 'Depths', fact: depths },
          { term: 'Grade', fact: <GradeShape grade={report.grade} /> },
        ]}
      />
      <Text>{`${report.joined} ${report.gradeWords}`}</Text>
      {report.leftOut.length > 0 ? (
        <Section title="Left out">
          <List label="Left out">
            {report.leftOut.map(({ reason, words }) => (
              <Row key={reason} title={words} />
            ))}
          </List>
        </Section>
      ) : null}
      {report.faultCount > 0 ? <LogFaultsPart report={report} /> : null}
    </>
  );
}

const AT_FIRST = 8;

function LogFaultsPart({ report: { faults, faultCount, files } }: { report: LogReport }) {
  const [all, setAll] = useState(false);
  const shown = all ? faults : faults.slice(0, AT_FIRST);
  const save = () =>
    void saveText(
      `${(files[0]?.name ?? 'log').replace(/\.[^.]*$/, '')}-faults.csv`,
      csvOf(
        ['file', 'counted by', 'number', 'value', 'what is wrong'],
        faults.map(({ file, unit, at, value, detail }) => [file, unit, at, value, detail]),
      ),
      'text/csv',
    );
  return (
    <Section
      title={`${countWords(faultCount, 'fault')} in the files`}
      note={
        faults.length < faultCount
          ? `The first ${figure(faults.length)} are kept here. What they stand on was left out; the rest was read.`
          : 'What they stand on was left out; the rest was read.'
      }
      end={<Button label="Faults as CSV" bank onPress={save} />}
    >
      <List label="Faults">
        {shown.map((fault) => (
          <Row
            key={`${fault.file} ${fault.at} ${fault.detail}`}
            title={fault.detail}
            note={faultNote(fault)}
          />
        ))}
      </List>
      {faults.length > shown.length ? (
        <Button label={`Show ${figure(faults.length)}`} kind="quiet" bank onPress={() => setAll(true)} />
      ) : null}
    </Section>
  );
}

const faultNote = ({ file, unit, at, value }: LogFault): string =>
  [file, `${unit} ${at}`, value === '' ? '' : `“${value}”`].filter(Boolean).join(' · ');
