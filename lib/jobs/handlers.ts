import { giveUpProposal, proposeStoredReading } from '@/lib/workflows/propose-reading';
import { engravePrint, giveUpPrint } from '@/lib/workflows/engrave-print';
import { giveUpScore, readStoredScore } from '@/lib/workflows/read-score';
import type { JobHandlers } from './run-job';

/** What each kind of job does; TypeScript misses one that is not here. */
export const JOB_HANDLERS: JobHandlers = {
  read_score: { run: readStoredScore, giveUp: giveUpScore },
  print_handout: { run: engravePrint, giveUp: giveUpPrint },
  propose_reading: { run: proposeStoredReading, giveUp: giveUpProposal },
};
