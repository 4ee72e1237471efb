/** `npm run bench -- SUBJECT`: measures and prints; nothing here passes or fails a build. One file per subject. */

const SUBJECTS: Readonly<Record<string, () => Promise<{ run(): Promise<void> }>>> = {
  score: () => import('./score'),
  harmony: () => import('./harmony'),
  desk: () => import('./desk'),
};

async function main(): Promise<void> {
  const subject = SUBJECTS[process.argv[2] ?? ''];
  if (!subject) {
    console.error(`usage: npm run bench -- ${Object.keys(SUBJECTS).join('|')}`);
    process.exitCode = 2;
    return;
  }
  await (await subject()).run();
}

void main();
