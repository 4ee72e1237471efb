/** How often a worker says that it lives. */
export const HEARTBEAT_EVERY_MS = 5_000;
/** A worker that was not seen for this long counts as gone. */
export const HEARTBEAT_LASTS_MS = 20_000;
