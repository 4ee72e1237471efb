/** One line per step with its time; on a terminal the running step is shown until it is done. */

/** A failure that the reader can mend: shown without a stack. */
export class SetupError extends Error {}

function seconds(from) {
  return `${((performance.now() - from) / 1000).toFixed(1)} s`;
}

/**
 * Runs `work` and prints `title` with the time it took. What `work` returns is returned; when it returns a string, the
 * line says it as well.
 */
export async function step(title, work) {
  const from = performance.now();
  if (process.stdout.isTTY) process.stdout.write(`  … ${title}`);
  const clear = process.stdout.isTTY ? '\r\u001b[K' : '';
  try {
    const outcome = await work();
    const note = typeof outcome === 'string' ? ` (${outcome})` : '';
    process.stdout.write(`${clear}  ✓ ${title}${note}  ${seconds(from)}\n`);
    return outcome;
  } catch (error) {
    process.stdout.write(`${clear}  ✗ ${title}  ${seconds(from)}\n`);
    throw error;
  }
}

export function say(line = '') {
  process.stdout.write(`${line}\n`);
}
