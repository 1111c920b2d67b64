import Link from "next/link";
import type { ComponentProps } from "react";
import { buttonStyle, type ButtonLook } from "./button-style";

/** A link that leads to the next thing to do; looks like a button, opens like a link. */
export function LinkButton({
  kind,
  small,
  wide,
  ...props
}: Omit<ComponentProps<typeof Link>, "className"> & ButtonLook) {
  return <Link {...props} className={buttonStyle({ kind, small, wide })} />;
}

/**
 * A link in running text or in a table. Where it stands alone (an item of a grid or a row) it is as tall as anything
 * that is pressed; in a line of text those two words of style do nothing.
 */
export function TextLink(props: Omit<ComponentProps<typeof Link>, "className">) {
  return (
    <Link
      {...props}
      className="min-h-target content-center text-petrol underline decoration-edge decoration-1 underline-offset-4 hover:text-petrol-deep hover:decoration-current"
    />
  );
}
