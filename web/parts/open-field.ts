import type { LayoutEditing } from './layout-editor.tsx';

/** Whether a place of a layout still waits for a person to answer. */
export function isOpen({ statements, answered }: LayoutEditing, key: string): boolean {
  return statements.some((one) => one.key === key && one.basis === 'asked') && !answered.has(key);
}

/** Attributes that mark such a place. */
export function wrongIfOpen(editing: LayoutEditing, key: string) {
  return isOpen(editing, key) ? { 'aria-invalid': 'true' as const } : {};
}
