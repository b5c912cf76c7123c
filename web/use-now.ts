import { useEffect, useState } from 'preact/hooks';

/** The browser's clock, ms since 1970, told again every `everyMs`: ages grow while nothing else happens. */
export function useNow(everyMs = 1000): number {
  const [nowMs, setNowMs] = useState(() => Date.now());
  useEffect(() => {
    const timer = setInterval(() => setNowMs(Date.now()), everyMs);
    return () => clearInterval(timer);
  }, [everyMs]);
  return nowMs;
}
