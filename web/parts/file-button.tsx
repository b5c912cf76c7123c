import { useRef } from 'preact/hooks';

/** Opens the device's own file chooser; works with keyboard, finger and screen reader. */
export function FileButton({
  label,
  accept,
  primary = false,
  isUnderWay = false,
  onFile,
}: {
  label: string;
  accept?: string;
  primary?: boolean;
  isUnderWay?: boolean;
  onFile: (file: File) => void | Promise<void>;
}) {
  const input = useRef<HTMLInputElement>(null);
  return (
    <>
      <button
        type="button"
        class={primary ? 'primary' : ''}
        disabled={isUnderWay}
        onClick={() => input.current?.click()}
      >
        {label}
      </button>
      <input
        ref={input}
        type="file"
        hidden
        aria-label={label}
        {...(accept ? { accept } : {})}
        onChange={(event) => {
          const file = event.currentTarget.files?.[0];
          event.currentTarget.value = '';
          if (file) void onFile(file);
        }}
      />
    </>
  );
}
