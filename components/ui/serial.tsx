import clsx from "clsx";

/** A serial in groups of four, counted from the left; one that brings its own separators keeps them. */
const groupsOfFour = (serial: string): string[] =>
  /[^\p{L}\p{N}]/u.test(serial) ? [serial] : (serial.match(/.{1,4}/gu) ?? []);

/**
 * A serial, number or code in the type that cannot be misread. The gaps between the groups are space on the page,
 * not characters, so what is copied is the serial itself.
 */
export function Serial({ value, className }: { value: string; className?: string }) {
  return (
    <span translate="no" className={clsx("font-mono whitespace-nowrap [&>span+span]:ml-[0.35ch]", className)}>
      {groupsOfFour(value).map((group, index) => (
        <span key={index}>{group}</span>
      ))}
    </span>
  );
}
