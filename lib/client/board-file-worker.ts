import { contentsOf, neighbourRowsOf } from "@/lib/formats/ipc2581/contents";
import type { BoardFile } from "@/lib/formats/ipc2581/document";
import { BoardFileError } from "@/lib/formats/ipc2581/errors";
import { readBoard } from "@/lib/formats/ipc2581/read";
import type { BoardAnswer, BoardQuestion } from "./board-file";

let board: BoardFile | null = null;
const say = (answer: BoardAnswer) => postMessage(answer);

/** Runs in a Web Worker: reads a board file where it lies, so that nothing of it leaves the browser unasked. */
addEventListener("message", ({ data }: MessageEvent<BoardQuestion>) => {
  answer(data).catch((error: unknown) =>
    say({
      kind: "refused",
      message:
        error instanceof BoardFileError
          ? error.message
          : "This file could not be read in this browser. Reload the page and choose it again.",
    }),
  );
});

async function answer(question: BoardQuestion): Promise<void> {
  if (question.kind === "read") {
    board = null;
    board = await readBoard(question.file.stream(), {
      totalBytes: question.file.size,
      onProgress: (bytes) => say({ kind: "progress", bytes }),
    });
    say({ kind: "read", contents: contentsOf(board) });
  }
  if (board) say({ kind: "neighbours", neighbours: neighbourRowsOf(board, question.distance_m) });
}
