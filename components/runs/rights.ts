import { roleMay, type Role } from "@/lib/schemas/role";

/** Who looks, and what their role lets them do; which draft they may judge, the server decides. */
export interface Rights {
  userId: string;
  start: boolean;
  cancel: boolean;
  flag: boolean;
  comment: boolean;
  waive: boolean;
  sign: boolean;
  setLimits: boolean;
}

export function rightsOf({ userId, role }: { userId: string; role: Role }): Rights {
  return {
    userId,
    start: roleMay(role, "run:start"),
    cancel: roleMay(role, "run:cancel"),
    flag: roleMay(role, "review:flag"),
    comment: roleMay(role, "review:comment"),
    waive: roleMay(role, "review:waive"),
    sign: roleMay(role, "review:sign"),
    setLimits: roleMay(role, "limits:set"),
  };
}
