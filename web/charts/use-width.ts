import type { RefObject } from 'preact';
import { useLayoutEffect, useState } from 'preact/hooks';

/** Width of an element in px, kept as it changes; pictures are drawn at their true size, so that letters stay letters. */
export function useWidth(element: RefObject<HTMLElement | null>): number {
  const [width, setWidth] = useState(0);
  useLayoutEffect(() => {
    const node = element.current;
    if (!node) return;
    const watch = new ResizeObserver(() => setWidth(Math.round(node.getBoundingClientRect().width)));
    setWidth(Math.round(node.getBoundingClientRect().width));
    watch.observe(node);
    return () => watch.disconnect();
  }, []);
  return width;
}
