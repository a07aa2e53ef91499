import { z } from "zod";
import { route } from "@/lib/auth/route";
import { acknowledge, getLinkedNote } from "@/lib/db/release";
import { acknowledgement, linkToken } from "@/lib/schemas/release";

export const POST = route({
  access: "public",
  params: z.object({ token: linkToken }),
  body: acknowledgement,
  handler: async ({ params, body }) => {
    const sent = await getLinkedNote(params.token);
    await acknowledge(sent, `${sent.recipientName}, by link`, body.words);
  },
});
