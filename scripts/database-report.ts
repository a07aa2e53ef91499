/** Runs a step of maintenance and says in one sentence how it ended. */
export async function report(step: () => Promise<string>): Promise<void> {
  try {
    console.log(await step());
  } catch (error) {
    console.error(error instanceof Error ? error.message : String(error));
    process.exitCode = 1;
  }
}
