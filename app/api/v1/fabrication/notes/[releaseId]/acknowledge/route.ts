import { z } from "zod";
import { route } from "@/lib/auth/route";
import { acknowledge, getSentNote } from "@/lib/db/release";
import { id } from "@/lib/schemas/common";
import { acknowledgement } from "@/lib/schemas/release";

export const POST = route({
  access: "session",
  params: z.object({ releaseId: id }),
  body: acknowledgement,
  handler: async ({ signedIn, params, body }) => {
    await acknowledge(await getSentNote(signedIn.email, params.releaseId), signedIn.name, body.words);
  },
});
