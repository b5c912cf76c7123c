import { useEffect } from 'preact/hooks';
import { workshop } from './workshop.ts';

/** Names the page in the browser's title: `Run 212 · Skerry Row · Dwellbook`. */
export function usePageTitle(title: string): void {
  const shop = workshop.value?.name;
  useEffect(() => {
    document.title = [title, shop, 'Dwellbook'].filter(Boolean).join(' · ');
  }, [title, shop]);
}
