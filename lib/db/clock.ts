import "server-only";

type Clock = () => number;

const holder = globalThis as typeof globalThis & { ringfenceClock?: Clock };

/** Milliseconds UTC: the only place where the database's code reads the time. */
export function now(): number {
  return (holder.ringfenceClock ?? Date.now)();
}

/** Lets a test say what time it is; null gives the real time back. */
export function setClock(clock: Clock | null): void {
  if (clock) holder.ringfenceClock = clock;
  else delete holder.ringfenceClock;
}
