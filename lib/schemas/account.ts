import { z } from "zod";
import { nameText } from "./common";
import { roles } from "./role";

const email = z
  .string()
  .trim()
  .toLowerCase()
  .pipe(z.email("Write an e-mail address, such as name@example.org."));

/** Long rather than odd: length is what guessing costs. */
export const PASSWORD_MIN = 10;
export const PASSWORD_MAX = 128;
const newPassword = z
  .string()
  .min(PASSWORD_MIN, `Use at least ${PASSWORD_MIN} characters; a few unrelated words do well.`)
  .max(PASSWORD_MAX, `At most ${PASSWORD_MAX} characters.`);

export const signInForm = z.object({ email, password: z.string().min(1, "Write your password.") });
export const signUpForm = z.object({ name: nameText(80), email, password: newPassword });
export const forgotForm = z.object({ email });
export const resetForm = z.object({ password: newPassword });
export const teamForm = z.object({ name: nameText(80) });
export const inviteForm = z.object({ email, role: z.enum(roles) });

export type SignInForm = z.infer<typeof signInForm>;
export type SignUpForm = z.infer<typeof signUpForm>;
export type ForgotForm = z.infer<typeof forgotForm>;
export type ResetForm = z.infer<typeof resetForm>;
export type TeamForm = z.infer<typeof teamForm>;
export type InviteForm = z.infer<typeof inviteForm>;
