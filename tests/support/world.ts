import { randomUUID } from 'node:crypto';
import { insertReading, insertReadingContent } from '@/db/queries/reading-rows';
import { courseMembers, courses, departmentMembers, departments, excerpts, scores, users } from '@/db/schema';
import type { Actor } from '@/lib/auth/actor';
import { unwrap } from '@/lib/result';
import { sha256Of } from '@/lib/storage/object-store';
import type { CourseRole, ReadingKind, Role, Sharing } from '@/lib/vocabularies';
import { createAssignment } from '@/lib/workflows/create-assignment';
import type { Deps } from '@/lib/workflows/deps';
import { handIn } from '@/lib/workflows/hand-in';
import { writeInvitation } from '@/lib/workflows/invite';
import { openAssignment } from '@/lib/workflows/open-assignment';
import { addRemark } from '@/lib/workflows/remarks';
import { startSubmission } from '@/lib/workflows/start-submission';
import { readingFrom } from './reading-notation';

/** Two whole-note chords in C with their numerals sung: what the excerpt's readings are about. */
const MUSIC = `<?xml version="1.0" encoding="UTF-8"?>
<score-partwise version="4.0">
  <part-list><score-part id="P1"><part-name>Piano</part-name></score-part></part-list>
  <part id="P1">
    <measure number="1">
      <attributes><divisions>1</divisions><key><fifths>0</fifths></key><time><beats>4</beats><beat-type>4</beat-type></time></attributes>
      <note><pitch><step>C</step><octave>4</octave></pitch><duration>4</duration><voice>1</voice><type>whole</type><lyric><text>I</text></lyric></note>
      <note><chord/><pitch><step>E</step><octave>4</octave></pitch><duration>4</duration><voice>1</voice><type>whole</type></note>
      <note><chord/><pitch><step>G</step><octave>4</octave></pitch><duration>4</duration><voice>1</voice><type>whole</type></note>
    </measure>
    <measure number="2">
      <note><pitch><step>G</step><octave>3</octave></pitch><duration>4</duration><voice>1</voice><type>whole</type><lyric><text>V</text></lyric></note>
      <note><chord/><pitch><step>D</step><octave>4</octave></pitch><duration>4</duration><voice>1</voice><type>whole</type></note>
      <note><chord/><pitch><step>B</step><octave>4</octave></pitch><duration>4</duration><voice>1</voice><type>whole</type></note>
    </measure>
  </part>
</score-partwise>`;

export const MUSIC_BYTES = new TextEncoder().encode(MUSIC);

/** A name that no answer may hold for someone who must not know of the thing. */
export const SECRET_TITLE = 'Title that must not leak';

export async function addPerson(deps: Deps, departmentId: string, role: Role, mailbox: string): Promise<Actor> {
  const person = { userId: deps.newId(), departmentId, role, name: `${mailbox} of the tests`, email: `${mailbox}@${departmentId}.example` };
  await deps.db.insert(users).values({ id: person.userId, email: person.email, name: person.name, passwordHash: null });
  await deps.db.insert(departmentMembers).values({ departmentId, userId: person.userId, role });
  return person;
}

export async function addDepartment(deps: Deps, name: string): Promise<string> {
  const id = deps.newId();
  await deps.db.insert(departments).values({ id, name, slug: `department-${id}` });
  return id;
}

export async function addCourse(
  deps: Deps,
  departmentId: string,
  enrolmentCode: string,
  members: readonly (readonly [Actor, CourseRole])[],
): Promise<string> {
  const id = deps.newId();
  await deps.db.insert(courses).values({ id, departmentId, title: SECRET_TITLE, term: 'Autumn', code: 'T 1', enrolmentCode });
  await deps.db.insert(courseMembers).values(members.map(([{ userId }, role]) => ({ courseId: id, userId, role })));
  return id;
}

export async function addScore(deps: Deps, by: Actor): Promise<string> {
  const id = deps.newId();
  const sha256 = sha256Of(MUSIC_BYTES);
  await deps.storage.put(sha256, MUSIC_BYTES, 'application/xml');
  await deps.db.insert(scores).values({
    id,
    departmentId: by.departmentId,
    uploadedBy: by.userId,
    title: SECRET_TITLE,
    composer: 'Nobody',
    source: 'Written for the tests',
    rights: 'Public domain',
    fileName: 'two-chords.musicxml',
    sha256,
    byteSize: MUSIC_BYTES.length,
    state: 'ready',
    ticksPerQuarter: 1,
    bars: [0, 1].map((index) => ({ index, number: String(index + 1), start: 4 * index, length: 4 })),
    noteCount: 6,
    keyFifths: 0,
  });
  return id;
}

export async function addExcerpt(deps: Deps, by: Actor, scoreId: string): Promise<string> {
  const id = deps.newId();
  await deps.db.insert(excerpts).values({
    id,
    scoreId,
    departmentId: by.departmentId,
    title: SECRET_TITLE,
    purpose: '',
    firstBar: 0,
    lastBar: 1,
    startTick: 0,
    endTick: 8,
    createdBy: by.userId,
  });
  return id;
}

/** I and V, a bar each. */
export async function addReading(
  deps: Deps,
  departmentId: string,
  excerptId: string,
  reading: { readonly ownerId: string | null; readonly kind: ReadingKind; readonly shared?: Sharing },
): Promise<string> {
  const id = deps.newId();
  const { ownerId, kind, shared } = reading;
  await insertReading(deps.db, { id, excerptId, departmentId, ownerId, kind, title: SECRET_TITLE, state: 'open', startTick: 0, endTick: 8, ...(shared ? { shared } : {}) });
  const content = readingFrom('C: I V');
  await insertReadingContent(deps.db, id, { ...content, labels: content.labels.map((label) => ({ ...label, id: randomUUID() })) });
  return id;
}

/** Everyone the permission matrix asks for, in one department with two courses, and one department beside it. */
async function addPeople(deps: Deps) {
  const departmentId = await addDepartment(deps, SECRET_TITLE);
  const elsewhere = await addDepartment(deps, 'Another department');
  const here = (role: Role, mailbox: string) => addPerson(deps, departmentId, role, mailbox);
  return {
    departmentId,
    owner: await here('owner', 'owner'),
    instructor: await here('instructor', 'instructor'),
    otherInstructor: await here('instructor', 'other-instructor'),
    assistant: await here('assistant', 'assistant'),
    student: await here('student', 'student'),
    classmate: await here('student', 'classmate'),
    otherStudent: await here('student', 'other-student'),
    otherOwner: await addPerson(deps, elsewhere, 'owner', 'other-owner'),
  };
}

type People = Awaited<ReturnType<typeof addPeople>>;

async function addLibrary(deps: Deps, people: People) {
  const { departmentId, instructor } = people;
  const scoreId = await addScore(deps, instructor);
  const excerptId = await addExcerpt(deps, instructor, scoreId);
  const add = (reading: Parameters<typeof addReading>[3]) => addReading(deps, departmentId, excerptId, reading);
  return {
    scoreId,
    excerptId,
    engineReadingId: await add({ ownerId: null, kind: 'engine' }),
    privateReadingId: await add({ ownerId: instructor.userId, kind: 'person' }),
    discussedReadingId: await add({ ownerId: instructor.userId, kind: 'person', shared: 'comment' }),
    sharedReadingId: await add({ ownerId: instructor.userId, kind: 'person', shared: 'edit' }),
    keyReadingId: await add({ ownerId: instructor.userId, kind: 'key' }),
  };
}

type Library = Awaited<ReturnType<typeof addLibrary>>;

async function addAssignment(deps: Deps, people: People, library: Library, courseId: string): Promise<string> {
  const { excerptId, keyReadingId: readingId } = library;
  const made = await createAssignment(deps, people.instructor, { courseId, title: SECRET_TITLE, readingId, excerptId });
  return unwrap(made).assignmentId;
}

async function addCourses(deps: Deps, people: People, library: Library) {
  const { departmentId, instructor, otherInstructor, assistant, student, classmate, otherStudent } = people;
  const courseId = await addCourse(deps, departmentId, `JOIN-${departmentId.slice(0, 8).toUpperCase()}`, [
    [instructor, 'instructor'],
    [assistant, 'assistant'],
    [student, 'student'],
    [classmate, 'student'],
  ]);
  const otherCourseId = await addCourse(deps, departmentId, `ELSE-${departmentId.slice(0, 8).toUpperCase()}`, [
    [otherInstructor, 'instructor'],
    [otherStudent, 'student'],
  ]);
  const draftId = await addAssignment(deps, people, library, courseId);
  const assignmentId = await addAssignment(deps, people, library, courseId);
  unwrap(await openAssignment(deps, instructor, { assignmentId }));
  const handedAssignmentId = await addAssignment(deps, people, library, courseId);
  unwrap(await openAssignment(deps, instructor, { assignmentId: handedAssignmentId }));
  const working = unwrap(await startSubmission(deps, student, { assignmentId }));
  const handed = unwrap(await startSubmission(deps, student, { assignmentId: handedAssignmentId }));
  unwrap(await handIn(deps, student, { submissionId: handed.submissionId, version: 0 }));
  return {
    courseId,
    otherCourseId,
    joinCode: `JOIN-${departmentId.slice(0, 8).toUpperCase()}`,
    draftId,
    assignmentId,
    handedAssignmentId,
    submissionId: working.submissionId,
    handedSubmissionId: handed.submissionId,
  };
}

/** A whole small department, made by the real workflows where there are some. */
export async function createWorld(deps: Deps) {
  const people = await addPeople(deps);
  const library = await addLibrary(deps, people);
  const taught = await addCourses(deps, people, library);
  const { invitationId } = await writeInvitation(deps, people.owner, { email: 'new@person.example', role: 'student', course: null });
  const remark = { readingId: library.discussedReadingId, body: SECRET_TITLE, labelId: null, barIndex: 0, threadId: null };
  const { remarks } = unwrap(await addRemark(deps, people.instructor, remark));
  return { ...people, ...library, ...taught, invitationId, remarkId: remarks[0]?.id ?? '' };
}

export type World = Awaited<ReturnType<typeof createWorld>>;
