import { ButtonLink } from "../button-link";
import { DateTime } from "../date-time";
import { Sheet } from "../sheet";

interface MailDetailProps {
  readonly mail: {
    readonly subject: string;
    readonly recipient: string;
    readonly createdAt: Date | string;
    /** Null where its link lets whoever has it in. */
    readonly text: string | null;
  };
  readonly closeHref: string;
}

/** One mail as it reads in plain text. */
export function MailDetail({ mail, closeHref }: MailDetailProps) {
  return (
    <Sheet label={mail.subject} padded>
      <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-2">
        <div className="min-w-0">
          <h2 className="text-lead font-semibold break-words">{mail.subject}</h2>
          <p className="text-small text-soft">
            <span className="measure break-all">{mail.recipient}</span> ·{" "}
            <DateTime at={mail.createdAt} show="day-time" />
          </p>
        </div>
        <ButtonLink to={closeHref} variant="plain" size="small">
          Close
        </ButtonLink>
      </div>
      {mail.text === null ? (
        <p className="mt-4 text-small text-soft">
          The link in this mail lets whoever has it in, so its words are shown to nobody else.
        </p>
      ) : (
        <p className="measure mt-4 max-w-prose text-small break-words whitespace-pre-wrap">{mail.text}</p>
      )}
    </Sheet>
  );
}
