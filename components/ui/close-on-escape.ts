import type { KeyboardEvent } from "react";

/** On a `<details>`: Escape closes it, and the focus is back on its button. */
export function closeOnEscape(event: KeyboardEvent<HTMLDetailsElement>): void {
  const box = event.currentTarget;
  if (event.key !== "Escape" || !box.open) return;
  event.stopPropagation();
  box.open = false;
  box.querySelector("summary")?.focus();
}
