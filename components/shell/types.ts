/** Who is signed in, as the shell shows them. */
export interface ShellUser {
  name: string;
  email: string;
}

/** A team that this person belongs to, and as what. */
export interface ShellTeam {
  id: string;
  name: string;
  role: string;
}
