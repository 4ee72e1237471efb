import type { PendingEdit } from './desk-state';

/**
 * Edits that the server has not confirmed, kept in the browser's storage so that a closed tab or a lost connection loses
 * none. Each tab writes its own list; a list whose tab is gone is adopted by the next desk opened on the reading. Sending
 * one twice does no harm: the server does each edit id once.
 */
const PREFIX = 'understave.edits';
/** A list not written for this long belongs to a tab that is gone, where the browser cannot tell us better. */
const GONE_MS = 20_000;

interface StoredEdits {
  readonly writtenAt: number;
  readonly edits: readonly PendingEdit[];
}

export interface EditStore {
  keep(edits: readonly PendingEdit[]): void;
  /** Takes over what tabs that are gone left behind, oldest first. */
  adopt(now: number): Promise<PendingEdit[]>;
  close(): void;
}

export function openEditStore(storage: Storage, userId: string, readingId: string, tabId: string): EditStore {
  const scope = `${PREFIX}.${userId}.${readingId}.`;
  const own = scope + tabId;
  const release = holdLock(own);
  return {
    keep(edits) {
      if (edits.length === 0) storage.removeItem(own);
      else storage.setItem(own, JSON.stringify({ writtenAt: Date.now(), edits } satisfies StoredEdits));
    },
    async adopt(now) {
      const alive = await livingTabs();
      const left = Object.keys(storage).filter((key) => key.startsWith(scope) && key !== own);
      const lists = left.flatMap((key) => takeOver(storage, key, alive, now));
      return lists.sort((a, b) => a.writtenAt - b.writtenAt).flatMap((list) => list.edits);
    },
    close: release,
  };
}

function takeOver(storage: Storage, key: string, alive: ReadonlySet<string> | null, now: number): StoredEdits[] {
  const list = parseStored(storage.getItem(key));
  if (!list || (alive ? alive.has(key) : now - list.writtenAt < GONE_MS)) return [];
  storage.removeItem(key);
  return [list];
}

function parseStored(text: string | null): StoredEdits | null {
  if (!text) return null;
  try {
    return JSON.parse(text) as StoredEdits;
  } catch {
    return null;
  }
}

/** While a tab lives it holds a lock named after its list. */
function holdLock(name: string): () => void {
  let release = () => {};
  const held = new Promise<void>((resolve) => {
    release = resolve;
  });
  navigator.locks?.request(name, () => held).catch(() => undefined);
  return release;
}

/** Names of the lists whose tabs live; null where the browser does not tell. */
async function livingTabs(): Promise<ReadonlySet<string> | null> {
  const locks = await navigator.locks?.query();
  return locks ? new Set((locks.held ?? []).map((lock) => lock.name ?? '')) : null;
}
