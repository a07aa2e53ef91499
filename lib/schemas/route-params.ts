import { z } from "zod";
import { id, resultKey } from "./common";

/** Ids in the paths of the API. */
export const projectParams = z.object({ projectId: id });
export const importParams = projectParams.extend({ importId: id });
export const runParams = projectParams.extend({ runId: id });
export const runPathParams = runParams.extend({ pathId: resultKey });
export const flagParams = projectParams.extend({ flagId: id });
export const waiverParams = projectParams.extend({ waiverId: id });
export const acceptanceParams = projectParams.extend({ acceptanceId: id });
export const signOffParams = projectParams.extend({ signOffId: id });
export const releaseParams = projectParams.extend({ releaseId: id });
export const recipientParams = releaseParams.extend({ recipientId: id });
