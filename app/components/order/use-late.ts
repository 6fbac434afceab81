import { useEffect, useState } from "react";

/** After this a wait is no longer a matter of seconds. */
const LATE_MS = 12_000;

/** Whether something has been waited for longer than it should take. */
export function useLate(waiting: boolean): boolean {
  const [late, setLate] = useState(false);
  useEffect(() => {
    setLate(false);
    if (!waiting) return;
    const timer = setTimeout(() => setLate(true), LATE_MS);
    return () => clearTimeout(timer);
  }, [waiting]);
  return late;
}
