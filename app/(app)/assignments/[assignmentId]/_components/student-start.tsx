import { LocalTime } from '@/components/marking/local-time';
import { WorkStateMark } from '@/components/marking/work-state';
import { ButtonLink, Facts, Mark, PageHeader, Section, WarningNote } from '@/components/ui';
import type { Assignment } from '@/db/queries/assignments';
import type { Submission } from '@/db/queries/submissions';
import { formatPoints } from '@/lib/marking/points';
import { BeginButton } from './begin-button';

interface StudentStartProps {
  readonly assignment: Assignment;
  readonly submissions: readonly Submission[];
  /** Why no new attempt can begin; null when one can. */
  readonly refusal: string | null;
  readonly taken: boolean;
  readonly now: Date;
}

/** What a student reads before beginning, and finds again afterwards. */
export function StudentStart({ assignment, submissions, refusal, taken, now }: StudentStartProps) {
  const working = submissions.find((one) => one.state === 'working');
  const { id, title, courseId, courseTitle, composer, scoreTitle, excerptTitle, instructions } = assignment;
  return (
    <div className="sheet pb-16">
      <PageHeader
        title={title}
        subtitle={[composer, scoreTitle, excerptTitle].filter((part, i, all) => part && all.indexOf(part) === i).join(', ')}
        crumbs={[{ label: 'My work', href: '/courses' }, { label: courseTitle, href: `/courses/${courseId}` }, { label: title }]}
      />
      <div className="grid gap-x-12 gap-y-8 md:grid-cols-[minmax(0,1fr)_20rem]">
        <div>
          {instructions ? <p className="measure mb-6 font-book text-lead whitespace-pre-line">{instructions}</p> : null}
          <Task assignment={assignment} />
          <div className="mt-8">
            {working ? <ButtonLink kind="primary" href={`/submissions/${working.id}`}>Go on with it</ButtonLink> : null}
            {!working && taken ? <BeginButton assignmentId={id} again={submissions.length > 0} /> : null}
            {!working && refusal ? <WarningNote>{refusal}</WarningNote> : null}
          </div>
        </div>
        <Dates assignment={assignment} now={now} />
      </div>
      {submissions.length > 0 ? <Attempts submissions={submissions} dueAt={assignment.dueAt} /> : null}
    </div>
  );
}

function Task({ assignment }: { readonly assignment: Assignment }) {
  return (
    <ul className="measure flex list-disc flex-col gap-1 pl-5">
      <li>{assignment.segmentation === 'given' ? 'The spans are given: write a numeral under each that is asked.' : 'You decide where the chords change: split and join the spans, and write a numeral under each.'}</li>
      <li>{assignment.keysGiven ? 'The keys are given.' : 'You decide where the key goes: change it from a label on.'}</li>
      <li>Your work is saved as you write. A lost connection loses nothing.</li>
    </ul>
  );
}

function Dates({ assignment, now }: { readonly assignment: Assignment; readonly now: Date }) {
  const { opensAt, dueAt, closesAt, attempts } = assignment;
  const facts = [
    ...(opensAt && opensAt > now ? [{ term: 'Opens', value: <LocalTime at={opensAt.toISOString()} /> }] : []),
    { term: 'Due', value: dueAt ? <LocalTime at={dueAt.toISOString()} /> : 'no date' },
    ...(closesAt ? [{ term: 'Closes', value: <LocalTime at={closesAt.toISOString()} /> }] : []),
    { term: 'Attempts', value: attempts === 1 ? 'one' : `up to ${attempts}; the last one counts` },
  ];
  return <div><Facts facts={facts} /></div>;
}

function Attempts({ submissions, dueAt }: { readonly submissions: readonly Submission[]; readonly dueAt: Date | null }) {
  return (
    <div className="mt-10">
      <Section title="Your attempts">
        <ul className="divide-y divide-rule border-y border-rule">
          {submissions.map((one) => (
            <li key={one.id} className="flex flex-wrap items-baseline gap-x-6 gap-y-1 py-2">
              <span className="min-w-20">Attempt {one.attempt}</span>
              <WorkStateMark state={one.state} />
              {one.handedInAt ? <LocalTime at={one.handedInAt.toISOString()} /> : null}
              {one.handedInAt && dueAt && one.handedInAt > dueAt ? <Mark tone="eye" shape="triangle">late</Mark> : null}
              {one.points !== null && one.maxPoints !== null ? <span className="tabular">{formatPoints(one.points)} of {formatPoints(one.maxPoints)} points</span> : null}
              <span className="ml-auto">
                {one.state === 'released' ? <ButtonLink size="small" href={`/submissions/${one.id}/feedback`}>Feedback</ButtonLink> : <ButtonLink size="small" kind="quiet" href={`/submissions/${one.id}`}>{one.state === 'working' ? 'Go on' : 'Look at it'}</ButtonLink>}
              </span>
            </li>
          ))}
        </ul>
      </Section>
    </div>
  );
}
