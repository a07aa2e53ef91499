import { baseUrl } from "@/lib/auth/environment";
import { getProject } from "@/lib/db/project";
import { findColleague } from "@/lib/db/review";
import { sendMailLater } from "@/lib/email/transport";
import { flagAssignedMessage } from "@/lib/email/work-messages";
import type { Actor } from "@/lib/schemas/actor";

/** Tells somebody that a flag is theirs now; nobody is told of what they gave themselves. */
export async function notifyAssignee(
  actor: Actor,
  projectId: string,
  flag: { id: string; assigneeUserId: string; title: string; comment: string },
): Promise<void> {
  if (flag.assigneeUserId === actor.userId) return;
  const [person, project] = await Promise.all([
    findColleague(actor, flag.assigneeUserId),
    getProject(actor, projectId),
  ]);
  if (!person) return;
  sendMailLater(
    flagAssignedMessage(person.email, {
      by: actor.name,
      projectName: project.name,
      subject: flag.title,
      comment: flag.comment,
      url: `${baseUrl()}/projects/${projectId}/review?flag=${flag.id}`,
    }),
  );
}
