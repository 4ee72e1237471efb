/** Types of what benches use of test-parts.mjs. */
export interface Served {
  readonly BASE_URL: string;
}

/** The production build with the demo in it, on ports and in folders of its own. `defer` is given what ends it, last first. */
export function serveDemo(run: { defer(end: () => unknown): void; readonly workDir: string; readonly distDir: string }): Promise<Served>;
