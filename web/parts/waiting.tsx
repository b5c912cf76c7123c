import { useEffect, useState } from 'preact/hooks';

/** Says what is being done once it has taken half a second; before that a page stays quiet. */
export function Waiting({ what }: { what: string }) {
  const [isSlow, setIsSlow] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setIsSlow(true), 500);
    return () => clearTimeout(timer);
  }, []);
  return (
    <p class="soft" role="status">
      {isSlow ? `${what} …` : ''}
    </p>
  );
}
