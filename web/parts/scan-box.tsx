import { useEffect, useRef } from 'preact/hooks';
import { useLocation } from 'preact-iso';

/** Takes any code, scanned or typed, and goes where it leads. `/` reaches it from anywhere. */
export function ScanBox() {
  const { route } = useLocation();
  const input = useRef<HTMLInputElement>(null);
  useEffect(() => {
    const reach = (event: KeyboardEvent) => {
      if (event.key !== '/' || event.ctrlKey || event.metaKey || event.altKey || isTyping(event.target)) return;
      event.preventDefault();
      input.current?.focus();
      input.current?.select();
    };
    addEventListener('keydown', reach);
    return () => removeEventListener('keydown', reach);
  }, []);
  const go = (event: Event) => {
    event.preventDefault();
    const code = input.current?.value.trim() ?? '';
    if (code === '') return;
    if (input.current) input.current.value = '';
    route(`/find?${new URLSearchParams({ code })}`);
  };
  return (
    <search class="scan">
      <form onSubmit={go}>
        <input
          ref={input}
          type="search"
          name="code"
          aria-label="Scan or type any code: run, part, cycle, work order"
          aria-keyshortcuts="/"
          placeholder="Scan or type any code  /"
          autocomplete="off"
          spellcheck={false}
        />
      </form>
    </search>
  );
}

/** True where a key press is text: keys of the page must not take it. */
export function isTyping(target: EventTarget | null): boolean {
  return (
    target instanceof HTMLInputElement ||
    target instanceof HTMLTextAreaElement ||
    target instanceof HTMLSelectElement ||
    (target instanceof HTMLElement && target.isContentEditable)
  );
}
