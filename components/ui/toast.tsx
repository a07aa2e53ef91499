"use client";

import dynamic from "next/dynamic";
import type { toast as sonner } from "sonner";

type Say = (...message: Parameters<typeof sonner.success>) => void;

const Messages = dynamic(() => import("./toaster"), { ssr: false });

let begin: () => void;
/** What is said before the messages' chunk has come waits for it. */
const ready = new Promise<void>((resolve) => (begin = resolve));
const onReady = () => begin();

/** Where messages appear; one per app, placed by the providers. Say with `toast(…)`, `toast.success(…)`, `toast.error(…)`. */
export function Toaster() {
  return <Messages onReady={onReady} />;
}

const say =
  (tone: "message" | "success" | "error"): Say =>
  (...message) =>
    void ready.then(() => import("sonner")).then(({ toast }) => toast[tone](...message));

export const toast = Object.assign(say("message"), { success: say("success"), error: say("error") });
