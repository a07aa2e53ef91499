import type { Metadata } from "next";
import { NetsView } from "@/components/nets/nets-view";
import { Sheet } from "@/components/shell/sheet";
import { readRevision, type NetsPageProps } from "./read-revision";

export const metadata: Metadata = { title: "Nets" };

export default async function NetsPage(props: NetsPageProps) {
  const known = await readRevision(props);
  return (
    <Sheet>
      <NetsView {...known} />
    </Sheet>
  );
}
