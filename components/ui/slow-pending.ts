import { useEffect, useState } from "react";

const SHOWN_AFTER_MS = 1000;

/** True once something has been pending for a second: quicker answers should not flicker. */
export function useSlowPending(isPending: boolean): boolean {
  const [isSlow, setSlow] = useState(false);

  useEffect(() => {
    if (!isPending) return;
    const timer = setTimeout(() => setSlow(true), SHOWN_AFTER_MS);
    return () => {
      clearTimeout(timer);
      setSlow(false);
    };
  }, [isPending]);

  return isPending && isSlow;
}
