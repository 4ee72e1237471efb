import { Mark, Row, SettledNote, type Shape, Table, Td, Th, type Tone } from '@/components/ui';
import type { AddedPerson } from '@/lib/workflows/add-people';
import type { RosterLine } from './parse-roster';

export function RosterPreview({ lines }: { readonly lines: readonly RosterLine[] }) {
  if (lines.length === 0) return null;
  const wrong = lines.filter((line) => line.problem !== null).length;
  return (
    <div className="flex flex-col gap-2">
      <p role="status" className="text-small">
        {lines.length - wrong} to add{wrong > 0 ? `, ${wrong} left out` : ''}.
      </p>
      <div className="max-h-64 overflow-y-auto">
        <Table caption="The list as it was understood">
          <thead>
            <Row>
              <Th className="text-right">Line</Th>
              <Th>Name</Th>
              <Th>E-mail</Th>
              <Th>Understood</Th>
            </Row>
          </thead>
          <tbody>
            {lines.map((line) => (
              <Row key={line.line}>
                <Td className="tabular text-right text-ink-soft">{line.line}</Td>
                <Td>{line.name}</Td>
                <Td className="break-all">{line.email}</Td>
                <Td>{line.problem ? <Mark tone="eye" shape="cross" className="whitespace-normal">{line.problem}</Mark> : <Mark tone="settled" shape="check">yes</Mark>}</Td>
              </Row>
            ))}
          </tbody>
        </Table>
      </div>
    </div>
  );
}

const OUTCOMES: Readonly<Record<AddedPerson['outcome'], { tone: Tone; shape: Shape; words: string }>> = {
  added: { tone: 'settled', shape: 'check', words: 'added' },
  invited: { tone: 'open', shape: 'dots', words: 'invited by mail' },
  already: { tone: 'plain', shape: 'dash', words: 'was in the course' },
  refused: { tone: 'eye', shape: 'cross', words: 'not added' },
};

/** What became of every line. */
export function AddedList({ people }: { readonly people: readonly AddedPerson[] }) {
  const count = (outcome: AddedPerson['outcome']) => people.filter((person) => person.outcome === outcome).length;
  return (
    <div className="flex flex-col gap-3">
      <SettledNote>{count('added')} added, {count('invited')} invited by mail, {count('already') + count('refused')} left as they were.</SettledNote>
      <ul className="max-h-72 divide-y divide-rule overflow-y-auto border-y border-rule">
        {people.map((person) => {
          const { tone, shape, words } = OUTCOMES[person.outcome];
          return (
            <li key={person.email} className="flex flex-wrap items-baseline justify-between gap-x-6 py-1">
              <span className="break-all">{person.email}</span>
              <Mark tone={tone} shape={shape} className="whitespace-normal">{person.reason ?? words}</Mark>
            </li>
          );
        })}
      </ul>
    </div>
  );
}
