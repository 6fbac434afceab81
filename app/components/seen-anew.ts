import type { ShouldRevalidateFunctionArgs } from "react-router";

/** The status of an act refused because somebody else was quicker. */
const CONFLICT = 409;

/** A page whose act met a change by somebody else is read again, so that it shows what that was. */
export const seenAnew = ({ actionStatus, defaultShouldRevalidate }: ShouldRevalidateFunctionArgs): boolean =>
  actionStatus === CONFLICT || defaultShouldRevalidate;
