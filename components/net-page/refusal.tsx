import { Notice } from "@/components/ui/notice";

/** What the server would not do, and why; the fields keep what was typed. */
export function Refusal({ text }: { text: string | null }) {
  return text ? <Notice tone="refusal">{text}</Notice> : null;
}
