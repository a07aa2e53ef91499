/** The part of an address that says which revision is looked at: its letter. Absent means the draft. */
export const REVISION_PARAM = "rev";
