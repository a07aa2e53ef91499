/**
 * What could not be saved when its editor left the screen, kept in this tab until one comes back to it. The browser
 * forgets it with the tab.
 */
const PREFIX = "unsaved:";
/** Savings that were still under way when their editor left the screen. */
const parting = new Map<string, Promise<boolean>>();

/** Notes the last saving of an editor that left; `unsaved` is kept where that fails. */
export function keepUnless(key: string, saved: Promise<boolean>, unsaved: () => unknown, tell: () => void) {
  const known = saved.then((done) => {
    if (parting.get(key) === known) parting.delete(key);
    if (!done) {
      try {
        sessionStorage.setItem(PREFIX + key, JSON.stringify(unsaved()));
      } catch {
        // No room, or none allowed: what is left is to say that it was not saved.
      }
      tell();
    }
    return done;
  });
  parting.set(key, known);
}

/** What was kept, once; null where all was saved. Waits for a saving that is under way. */
export async function takeKept(key: string): Promise<unknown> {
  await parting.get(key);
  const text = sessionStorage.getItem(PREFIX + key);
  if (text === null) return null;
  sessionStorage.removeItem(PREFIX + key);
  return JSON.parse(text) as unknown;
}
