'use client';

import { ChordName } from '@/components/marking/chord-name';
import { placeOf, shortPlaceOf } from '@/components/marking/place-names';
import { Checkbox, Row, Section, Table, Td, Th } from '@/components/ui';
import type { KeyLabel } from '@/lib/marking/key-reading';
import { formatPoints } from '@/lib/marking/points';
import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import type { EditedAssignment } from './edited-assignment';
import type { Questions } from './use-questions';

interface QuestionListProps {
  readonly assignment: EditedAssignment;
  readonly keyLabels: readonly KeyLabel[];
  readonly questions: Questions;
  readonly fixed: boolean;
  readonly currentId: string;
  onSelect(labelId: string): void;
  onToggle(labelId: string): void;
}

/** The same labels as a list, by bar: for narrow screens and for who works without the score. */
export function QuestionList({ assignment, keyLabels, questions, fixed, currentId, onSelect, onToggle }: QuestionListProps) {
  const sheet = assignment.conventions ?? DEFAULT_CONVENTIONS;
  return (
    <Section title="By bar">
      <Table caption="Labels of the key">
        <thead>
          <Row>
            <Th>Bar:beat</Th>
            <Th>Label of the key</Th>
            <Th>Asked</Th>
            <Th className="text-right">Points</Th>
            <Th>Also right</Th>
          </Row>
        </thead>
        <tbody>
          {keyLabels.map((label) => (
            <Row key={label.id} className={label.id === currentId ? 'bg-selection' : ''}>
              <Td className="tabular">
                <button type="button" className="link min-h-6" onClick={() => onSelect(label.id)} aria-label={`Choose ${placeOf(assignment.bars, label.start)}`}>{shortPlaceOf(assignment.bars, label.start)}</button>
              </Td>
              <Td>{label.numeral ? <ChordName chord={{ key: label.key, numeral: label.numeral }} sheet={sheet} keyShown /> : <span className="text-ink-soft">–</span>}</Td>
              <Td>
                {label.numeral ? (
                  <Checkbox
                    label={<span className="sr-only">Ask {placeOf(assignment.bars, label.start)}</span>}
                    checked={questions.has(label.start)}
                    disabled={fixed}
                    onChange={() => onToggle(label.id)}
                  />
                ) : null}
              </Td>
              <Td className="tabular text-right">{questions.has(label.start) ? formatPoints(questions.get(label.start) ?? assignment.rubric.pointsPerLabel) : '–'}</Td>
              <Td>
                <span className="flex flex-wrap gap-x-3">{label.alternatives.map((chord, place) => <ChordName key={place} chord={chord} sheet={sheet} />)}</span>
              </Td>
            </Row>
          ))}
        </tbody>
      </Table>
    </Section>
  );
}
