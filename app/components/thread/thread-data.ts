/** What the thread of an order shows to one reader: plain JSON, instants as ISO strings. */
export interface ThreadData {
  /** Oldest first. */
  readonly messages: readonly ThreadMessage[];
  /** There are older messages than these. */
  readonly earlier: boolean;
  /** Others' messages that the reader has not read. */
  readonly unread: number;
  /** Up to when the reader has read; null when never. */
  readonly readAt: string | null;
  /** Id of the newest event the data was made with. */
  readonly newestEvent: number;
  /** Mails about the order that did not arrive: all of them for staff, a builder's own for the builder. */
  readonly undelivered: readonly UndeliveredMail[];
}

export interface ThreadMessage {
  readonly id: string;
  readonly side: "builder" | "shop";
  /** `staff` is a note that builders never get. */
  readonly audience: "both" | "staff";
  readonly author: string;
  readonly mine: boolean;
  readonly body: string;
  readonly partLabel: string | null;
  /** Millimetres of the drawing. */
  readonly spot: { readonly x: number; readonly y: number } | null;
  readonly createdAt: string;
  readonly attachments: readonly ThreadAttachment[];
}

export interface ThreadAttachment {
  readonly id: string;
  readonly fileName: string;
  readonly contentType: string;
  /** Bytes. */
  readonly size: number;
  readonly href: string;
}

export interface UndeliveredMail {
  readonly id: string;
  readonly subject: string;
  readonly recipient: string;
  readonly error: string;
  readonly createdAt: string;
}

/** Which side's page a thread stands on. On a builder's page nobody sees staff notes, not even staff. */
export type ThreadAudience = "builder" | "staff";

/** A part, and a spot on the drawing in millimetres, that a message points at. */
export interface Pointing {
  readonly partLabel: string | null;
  readonly spot: { readonly x: number; readonly y: number } | null;
}

export const THREAD_PAGE = 30;
export const LONGEST_THREAD = 1_000;
/** The form's file field holds this; the server tells a file's type from its bytes. */
export const ACCEPTED_FILES = "image/png,image/jpeg,image/gif,image/webp,application/pdf,.pdf,.dxf";
