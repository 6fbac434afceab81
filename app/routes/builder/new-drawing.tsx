import { useEffect } from "react";
import { useFetcher, useNavigate } from "react-router";
import { requireAct, requireOrder } from "~/auth/guards.server";
import { ButtonLink } from "~/components/button-link";
import { ErrorPanel } from "~/components/error-panel";
import { useLiveOrder } from "~/components/live";
import { Notice } from "~/components/notice";
import { DropPlace } from "~/components/order/drop-place";
import { limitWords } from "~/components/order/limit-words";
import { UploadLine } from "~/components/order/upload-line";
import { useUploads } from "~/components/order/use-uploads";
import { PageHeader } from "~/components/page-header";
import { db } from "~/db/client.server";
import { orderInterpretation } from "~/flows/order-interpretation.server";
import { currentSettings } from "~/models/settings.server";
import type { Route } from "./+types/new-drawing";

/** What may be uploaded; with `?order=` also how far the reading of that order's drawings is. */
export async function loader(args: Route.LoaderArgs) {
  await requireAct(args, "order.create");
  const { upload } = await currentSettings(db);
  const orderId = new URL(args.request.url).searchParams.get("order");
  if (orderId === null) return { upload, drawings: [] };
  const { order } = await requireOrder(args, "order.edit", orderId);
  const { drawings } = await orderInterpretation(db, order);
  return {
    upload,
    drawings: drawings.map(({ drawing, reading }) => ({
      drawingId: drawing.id,
      state: stateOf(reading?.status),
      words: reading?.failure ?? null,
    })),
  };
}

const stateOf = (status: "queued" | "done" | "failed" | undefined): "read" | "failed" | "queued" =>
  status === "done" ? "read" : status === "failed" ? "failed" : "queued";

export default function NewDrawing({ loaderData }: Route.ComponentProps) {
  const { upload: limits } = loaderData;
  const { uploads, orderId, add } = useUploads({ orderId: null, limits });
  const progress = useFetcher<typeof loader>();
  const navigate = useNavigate();
  const { load } = progress;
  const readings = progress.data?.drawings ?? [];
  const readingOf = (drawingId: string | null) => readings.find((one) => one.drawingId === drawingId);
  const settled =
    uploads.length > 0 &&
    uploads.every(({ stage, drawingId }) =>
      stage === "refused" ? true : stage === "kept" && (readingOf(drawingId)?.state ?? "queued") !== "queued",
    );
  const taken = uploads.filter(({ drawingId }) => readingOf(drawingId)?.state === "read").length;
  const allTaken = settled && taken === uploads.length;

  useEffect(() => {
    if (allTaken && orderId) void navigate(`/orders/${orderId}`);
  }, [allTaken, orderId, navigate]);

  const kept = uploads.filter(({ stage }) => stage === "kept").length;
  useEffect(() => {
    if (orderId && kept > 0) void load(`/orders/new?order=${orderId}`);
  }, [orderId, kept, load]);

  return (
    <>
      <PageHeader
        title="New drawing"
        lead="One file with everything, or a file a sheet: each may carry several operations by layer."
      />
      <noscript>
        <Notice>Sending drawings needs a script in this browser; allow it for this page.</Notice>
      </noscript>
      <DropPlace
        size="sheet"
        label={uploads.length > 0 ? "Add another" : "Choose drawings"}
        primary={uploads.length === 0}
        words={
          <>
            Drop drawings here. {limitWords(limits)} Draw outlines as closed lines at full size; lettering and
            dimensions may stay in.
          </>
        }
        onFiles={add}
      >
        {uploads.length > 0 && (
          <ul aria-label="Files" className="w-full max-w-2xl space-y-5">
            {uploads.map((upload) => (
              <UploadLine key={upload.id} upload={upload} reading={readingOf(upload.drawingId)} />
            ))}
          </ul>
        )}
        {settled && !allTaken && orderId && (
          <ButtonLink to={`/orders/${orderId}`} variant="primary" size="large">
            {taken > 0 ? `Go on with ${taken} of ${uploads.length}` : "To the order"}
          </ButtonLink>
        )}
      </DropPlace>
      {orderId && (
        <FollowReading
          key={orderId}
          orderId={orderId}
          onEvent={() => void load(`/orders/new?order=${orderId}`)}
        />
      )}
    </>
  );
}

/** Hears of the readings of an order's drawings as they end. */
function FollowReading({ orderId, onEvent }: { readonly orderId: string; readonly onEvent: () => void }) {
  useLiveOrder({ orderId, after: 0, onEvent });
  return null;
}

export const meta: Route.MetaFunction = () => [{ title: "New drawing · Kerfpost" }];

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPanel error={error} />;
}
