import { getAuth } from "@/lib/auth/auth";

const handle = async (request: Request): Promise<Response> => (await getAuth()).handler(request);

export { handle as GET, handle as POST };
