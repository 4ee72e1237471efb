import Link from 'next/link';
import { placeOf } from '@/components/marking/place-names';
import { VerdictMark } from '@/components/marking/verdict-mark';
import { EmptyState, Row, Section, Table, Td, Th } from '@/components/ui';
import { type KindTally, type QuestionTally, tallyErrors, tallyQuestions } from '@/lib/marking/tally';
import { ERROR_KIND_NAMES, VERDICTS } from '@/lib/marking/verdict';
import type { AssignmentAnswers } from '@/lib/workflows/gradebook';
import { ShareBar } from './share-bar';

/** What went wrong, by kind over the course and by question of each assignment: the plan of the next lessons. */
export function Reteach({ answers }: { readonly answers: readonly AssignmentAnswers[] }) {
  const withWork = answers.filter((one) => one.answers.length > 0);
  if (withWork.length === 0) return <EmptyState title="Nothing to go by yet">Once work is handed in, the kinds of error and the hardest questions are counted here.</EmptyState>;
  const all = withWork.flatMap((one) => one.answers);
  const students = new Set(all.map((answer) => answer.studentId)).size;
  return (
    <>
      <Section title="By kind of error" aside={`${students} students, ${all.length} pieces of work`}>
        <Kinds kinds={tallyErrors(all)} students={students} />
      </Section>
      {withWork.map(({ assignment, answers: own }) => (
        <Section key={assignment.id} title={<Link href={`/assignments/${assignment.id}/marking`} className="link">{assignment.title}</Link>} aside="by question, the hardest first">
          <Questions questions={tallyQuestions(own)} place={(start) => placeOf(assignment.bars, start)} kinds={tallyErrors(own)} />
        </Section>
      ))}
    </>
  );
}

function Kinds({ kinds, students }: { readonly kinds: readonly KindTally[]; readonly students: number }) {
  if (kinds.length === 0) return <p className="text-ink-soft">No errors at all.</p>;
  return (
    <Table caption="Kinds of error">
      <thead>
        <Row>
          <Th>Kind</Th>
          <Th className="text-right">Students</Th>
          <Th className="text-right">Times</Th>
          <Th><span className="sr-only">Share of the students</span></Th>
        </Row>
      </thead>
      <tbody>
        {kinds.map((kind) => (
          <Row key={kind.kind}>
            <Th scope="row">{ERROR_KIND_NAMES[kind.kind]}</Th>
            <Td className="tabular text-right whitespace-nowrap">{kind.students} of {students}</Td>
            <Td className="tabular text-right">{kind.times}</Td>
            <Td className="w-1/3"><ShareBar share={kind.students / students} /></Td>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

interface QuestionsProps {
  readonly questions: readonly QuestionTally[];
  readonly kinds: readonly KindTally[];
  place(start: number): string;
}

function Questions({ questions, kinds, place }: QuestionsProps) {
  const hardest = questions.filter(({ mean }) => mean < 1).sort((a, b) => a.mean - b.mean || a.start - b.start);
  const easy = questions.length - hardest.length;
  return (
    <>
      {hardest.length > 0 ? <HardQuestions questions={hardest} kinds={kinds} place={place} /> : null}
      {easy > 0 ? <p className="mt-3 text-small text-ink-soft">{wordsForEasy(easy, hardest.length)}</p> : null}
    </>
  );
}

function wordsForEasy(easy: number, hard: number): string {
  if (hard === 0) return 'Every question was answered for full marks by everybody.';
  return easy === 1 ? 'One more question was answered for full marks by everybody.' : `${easy} more questions were answered for full marks by everybody.`;
}

function HardQuestions({ questions, kinds, place }: QuestionsProps) {
  return (
    <Table caption="Questions, the hardest first">
      <thead>
        <Row>
          <Th>Where</Th>
          <Th className="text-right">Of full marks</Th>
          <Th>Answers</Th>
          <Th>Commonest errors</Th>
        </Row>
      </thead>
      <tbody>
        {questions.map(({ start, mean, verdicts }) => (
          <Row key={start}>
            <Th scope="row" className="whitespace-nowrap first-letter:uppercase">{place(start)}</Th>
            <Td className="tabular text-right">{Math.round(mean * 100)} %</Td>
            <Td>
              <span className="flex flex-wrap gap-x-4">
                {VERDICTS.filter((verdict) => verdicts[verdict] > 0).map((verdict) => <span key={verdict} className="whitespace-nowrap"><span className="tabular">{verdicts[verdict]}</span> <VerdictMark verdict={verdict} /></span>)}
              </span>
            </Td>
            <Td className="text-small text-ink-soft">{kinds.filter((kind) => kind.starts.includes(start)).slice(0, 3).map((kind) => ERROR_KIND_NAMES[kind.kind]).join(', ')}</Td>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}
