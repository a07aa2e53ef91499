import { describe, expect, it } from "vitest";
import type { Engine } from "@/lib/client/engine";
import type { EngineJob } from "@/lib/client/engine-jobs";
import { EngineQueue, type Keyed } from "@/lib/client/engine-queue";

/** Answers when it is told to, and keeps what it was asked. */
function heldEngine() {
  const asked: string[] = [];
  const waiting: ((answer: unknown) => void)[] = [];
  const engine = {
    run: (job: { key: string }) => {
      asked.push(job.key);
      return new Promise((done) => waiting.push(done));
    },
  } as unknown as Engine;
  const answerNext = async () => {
    waiting.shift()?.(`answer to ${asked.at(-1)}`);
    await new Promise((done) => setTimeout(done, 0));
  };
  return { engine, asked, answerNext };
}

const job = (key: string): Keyed => ({ key, job: { key } as unknown as EngineJob });

describe("the queue before the engine", () => {
  it("asks one job at a time, in the order wanted, and keeps each answer by its key", async () => {
    const { engine, asked, answerNext } = heldEngine();
    const queue = new EngineQueue([engine]);
    queue.want([job("a"), job("b")]);
    expect(asked).toEqual(["a"]);
    await answerNext();
    expect(asked).toEqual(["a", "b"]);
    await answerNext();
    expect(queue.known().get("a")).toEqual({ answer: "answer to a" });
    queue.want([job("b"), job("a")]);
    expect(asked).toEqual(["a", "b"]);
  });

  it("does not begin what is no longer wanted", async () => {
    const { engine, asked, answerNext } = heldEngine();
    const queue = new EngineQueue([engine]);
    queue.want([job("a"), job("b"), job("c")]);
    queue.want([job("d")]);
    await answerNext();
    await answerNext();
    expect(asked).toEqual(["a", "d"]);
    expect([...queue.known().keys()]).toEqual(["a", "d"]);
  });

  it("gives what shares solutions to one engine, and the second engine back when told to", async () => {
    const [one, two] = [heldEngine(), heldEngine()];
    const queue = new EngineQueue([one.engine, two.engine]);
    const shared = (key: string, share: string) => ({ ...job(key), share });
    const jobs = [shared("a1", "a"), shared("b1", "b"), shared("a2", "a"), shared("b2", "b")];
    queue.want(jobs);
    expect([one.asked, two.asked]).toEqual([["a1"], ["b1"]]);
    await one.answerNext();
    expect(one.asked).toEqual(["a1", "a2"]);
    queue.want(jobs, 1);
    await two.answerNext();
    expect(two.asked).toEqual(["b1"]);
    await one.answerNext();
    expect(one.asked).toEqual(["a1", "a2", "b2"]);
  });

  it("keeps the sentence of a job that stopped, and goes on", async () => {
    const engine = {
      run: (asked: { key: string }) =>
        asked.key === "bad" ? Promise.reject(new Error("It stopped.")) : Promise.resolve("good"),
    } as unknown as Engine;
    const queue = new EngineQueue([engine]);
    let told = 0;
    queue.subscribe(() => told++);
    queue.want([job("bad"), job("next")]);
    await new Promise((done) => setTimeout(done, 0));
    expect(queue.known().get("bad")).toEqual({ error: "It stopped." });
    expect(queue.known().get("next")).toEqual({ answer: "good" });
    expect(told).toBeGreaterThan(0);
  });
});
