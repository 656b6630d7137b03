import { useEffect, useState } from 'preact/hooks';

/** Seconds since a moment, counted while the view is shown. @param {number} since */
export function useSeconds(since) {
  const [now, setNow] = useState(Date.now());
  useEffect(() => {
    const timer = setInterval(() => setNow(Date.now()), 1000);
    return () => clearInterval(timer);
  }, [since]);
  return Math.max(0, Math.round((now - since) / 1000));
}
