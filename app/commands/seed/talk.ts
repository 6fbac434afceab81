import { newId } from "~/db/new-id";
import { postMessage } from "~/flows/post-message.server";
import type { SeededPeople } from "./people";

/** One message of a thread: who wrote it, how many hours ago, and whether only the staff may read it. */
export interface DemoMessage {
  readonly from: "builder" | "operator" | "clerk" | "owner";
  readonly hoursAgo: number;
  readonly body: string;
  readonly staffOnly?: boolean;
  readonly part?: string;
}

/** Posts a thread in the order it was written. */
export async function talk(
  orderId: string,
  builder: SeededPeople[keyof SeededPeople],
  people: SeededPeople,
  messages: readonly DemoMessage[],
  now: Date,
): Promise<void> {
  for (const { from, hoursAgo, body, staffOnly, part } of messages) {
    const posted = await postMessage({
      actor: from === "builder" ? builder : people[from],
      orderId,
      messageId: newId(),
      audience: staffOnly ? "staff" : "both",
      body,
      partLabel: part ?? null,
      now: new Date(now.getTime() - hoursAgo * 60 * 60_000),
    });
    if (!posted.ok) throw new Error(posted.words);
  }
}
