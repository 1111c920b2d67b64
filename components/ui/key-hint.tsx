/** A key, or keys held together, as they stand on the keyboard: `keys={["Ctrl", "Enter"]}`. */
export function KeyHint({ keys }: { keys: readonly string[] }) {
  return (
    <span className="inline-flex gap-1">
      {keys.map((key) => (
        <kbd
          key={key}
          className="min-w-6 rounded-sheet border border-b-2 border-edge bg-paper px-1.5 text-center font-mono text-13 leading-5 text-ink-2"
        >
          {key}
        </kbd>
      ))}
    </span>
  );
}
