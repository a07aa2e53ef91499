export * from "./types";
export { stackHeight, validateCrossSection } from "./validate";
export { classifyCrossSection, type Side, type Structure } from "./classify";
export type { ClosedFormResult } from "./closed-form-result";
export { closedForms } from "./closed-forms";
export { bestClosedForm, type BestClosedForm } from "./best-closed-form";
