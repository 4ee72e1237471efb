/** Fills the demo: run it as often as you like, it adds what is missing and changes nothing that is there. */
import { createDeps } from '@/lib/workflows/deps';
import { seedPeople } from './people';

async function seed(): Promise<void> {
  const deps = createDeps();
  await seedPeople(deps);
}

seed().then(
  () => process.exit(0),
  (error: unknown) => {
    console.error(error);
    process.exit(1);
  },
);
