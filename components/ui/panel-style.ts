/** Menus, lists and tips that lie over the page: one edge, one shadow, a short fade. */
export const panelStyle =
  "rounded-sheet border border-edge bg-card text-ink shadow-panel transition duration-state entering:-translate-y-1 entering:opacity-0 exiting:opacity-0";

/** A row inside such a panel. */
export const listItemStyle =
  "flex min-h-control cursor-pointer items-center justify-between gap-4 rounded-sheet px-3 py-1.5 text-body no-underline focus:bg-well hover:bg-well selected:font-semibold focus-visible:-outline-offset-3";
