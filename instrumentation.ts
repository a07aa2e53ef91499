/** Called once when the server starts, before it answers: takes up what the process before this one left. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME === "nodejs") await (await import("./lib/jobs/resume-jobs")).resumeJobs();
}
