/** What the auth endpoints answer when they refuse. */
interface AuthError {
  code?: string | undefined;
  message?: string | undefined;
  status?: number;
}

const MESSAGES: Record<string, string> = {
  INVALID_EMAIL_OR_PASSWORD:
    "This e-mail address and password do not go together. Check both, or reset the password.",
  EMAIL_NOT_VERIFIED:
    "This address is not confirmed yet. Open the link in the message we sent, then sign in.",
  USER_ALREADY_EXISTS: "There is already an account with this address. Sign in, or reset its password.",
  USER_ALREADY_EXISTS_USE_ANOTHER_EMAIL:
    "There is already an account with this address. Sign in, or reset its password.",
  PASSWORD_TOO_SHORT: "This password is too short. Use at least 10 characters.",
  PASSWORD_TOO_LONG: "This password is too long. Use at most 128 characters.",
  INVALID_TOKEN: "This link was used already or has expired. Ask for a new one.",
  TOKEN_EXPIRED: "This link has expired. Ask for a new one.",
  INVITATION_NOT_FOUND:
    "This invitation was withdrawn, was used already or has expired. Ask the team for a new one.",
  YOU_ARE_NOT_THE_RECIPIENT_OF_THE_INVITATION:
    "This invitation is for another address. Sign in with the address it was sent to.",
  EMAIL_VERIFICATION_REQUIRED_BEFORE_ACCEPTING_OR_REJECTING_INVITATION:
    "Confirm your address first: open the link in the message we sent, then come back to this invitation.",
  USER_IS_ALREADY_A_MEMBER_OF_THIS_ORGANIZATION: "This person is in the team already.",
  USER_IS_ALREADY_INVITED_TO_THIS_ORGANIZATION:
    "This address has an open invitation. Withdraw it first to send another.",
  YOU_CANNOT_LEAVE_THE_ORGANIZATION_AS_THE_ONLY_OWNER:
    "You are the only owner. Make someone else an owner, then leave.",
  YOU_CANNOT_LEAVE_THE_ORGANIZATION_WITHOUT_AN_OWNER:
    "You are the only owner. Make someone else an owner, then leave.",
  YOU_ARE_NOT_ALLOWED_TO_INVITE_USERS_TO_THIS_ORGANIZATION: "Only an owner invites people.",
  YOU_ARE_NOT_ALLOWED_TO_UPDATE_THIS_MEMBER: "Only an owner changes roles.",
  YOU_ARE_NOT_ALLOWED_TO_DELETE_THIS_MEMBER: "Only an owner removes people.",
};

/** The sentence a person reads when an auth request was refused: the thing, the reason, the way out. */
export function authMessage(error: AuthError): string {
  const known = error.code ? MESSAGES[error.code] : undefined;
  if (known) return known;
  if (error.status === 429) return "Too many attempts in a short time. Wait a minute, then try again.";
  if (error.status !== undefined && error.status >= 500)
    return "The server could not do this now. Try again; if it happens once more, tell whoever runs it.";
  return error.message ?? "The server could not be reached. Check the connection, then try again.";
}
