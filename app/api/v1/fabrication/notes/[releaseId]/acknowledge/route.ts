import { z } from "zod";
import { route } from "@/lib/auth/route";
import { acknowledge, getSentNote } from "@/lib/db/release";
import { id } from "@/lib/schemas/common";
import { acknowledgement } from "@/lib/schemas/release";

export const POST = route({
  access: "session",
  params: z.object({ releaseId: id }),
  body: acknowledgement,
  handler: async ({ person, params, body }) => {
    await acknowledge(await getSentNote(person.email, params.releaseId), person.name, body.words);
  },
});
