import { ApiError, errorMessage } from "@/lib/client/api";

/** How an act on several problems went. */
export interface WorkedEach {
  done: number;
  /** the refusals in the server's words, each once */
  refusals: string[];
}

/** At a time: enough to be quick, few enough for the write queue. */
const AT_ONCE = 4;

/**
 * Does one act on each item. A refusal of one does not stop the others, except where it would hold for all of them:
 * who edited a draft waives nothing in it.
 */
export async function workEach<Item>(
  items: readonly Item[],
  act: (item: Item) => Promise<unknown>,
  onProgress: (done: number) => void = () => undefined,
): Promise<WorkedEach> {
  const refusals = new Set<string>();
  let next = 0;
  let tried = 0;
  let done = 0;
  let stopped = false;
  const feed = async () => {
    while (!stopped && next < items.length) {
      const item = items[next++];
      if (item === undefined) return;
      try {
        await act(item);
        done++;
      } catch (error) {
        refusals.add(errorMessage(error));
        if (error instanceof ApiError && (error.code === "editor" || error.status === 401)) stopped = true;
      }
      onProgress(++tried);
    }
  };
  await Promise.all(Array.from({ length: AT_ONCE }, feed));
  return { done, refusals: [...refusals] };
}
