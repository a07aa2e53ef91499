import Link from "next/link";
import { MessagePage } from "@/components/shell/message-page";

export default function NotFound() {
  return (
    <MessagePage title="There is nothing at this address for you">
      <p>
        It was removed, the link is incomplete, or it belongs to a team you are not signed in to. Ask whoever
        sent the link, or start again from your own projects.
      </p>
      <Link className="prose-link" href="/">
        Go to the start page
      </Link>
    </MessagePage>
  );
}
