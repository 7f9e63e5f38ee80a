import clsx from "clsx";
import Link from "next/link";
import type { ButtonHTMLAttributes, ComponentProps, ReactNode } from "react";

export type ButtonTone = "primary" | "plain" | "quiet" | "stop";

const TONES: Readonly<Record<ButtonTone, string>> = {
  primary: "border-dye bg-dye text-white hover:bg-dye-deep hover:border-dye-deep",
  plain: "border-ink bg-sheet text-ink hover:bg-dye-tint hover:border-dye",
  quiet:
    "border-transparent bg-transparent text-dye underline underline-offset-4 decoration-1 hover:decoration-2",
  stop: "border-alert bg-sheet text-alert hover:bg-alert-tint",
};

/** Class names of a button; 44 px tall for gloves, `big` 56 px for the bench. */
export function buttonClass(tone: ButtonTone = "plain", big = false): string {
  return clsx(
    "inline-flex items-center justify-center gap-2 border font-medium text-center transition-colors",
    "disabled:border-hair disabled:bg-shade disabled:text-soft disabled:no-underline disabled:hover:bg-shade",
    sizeClass(tone, big),
    TONES[tone],
  );
}

/** A quiet one reads as a link, so it stands flush with the text around it. */
function sizeClass(tone: ButtonTone, big: boolean): string {
  if (big) return "min-h-14 px-6 text-lg";
  return tone === "quiet" ? "min-h-11 px-1" : "min-h-11 px-4";
}

export interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  readonly tone?: ButtonTone;
  readonly big?: boolean;
  /** Work under way: the button waits and says so with `busyLabel`. */
  readonly busy?: boolean;
  readonly busyLabel?: string;
}

/** A button. Its type is "button" unless told otherwise, so that it never sends a form by accident. */
export function Button({
  tone = "plain",
  big,
  busy,
  busyLabel,
  className,
  children,
  disabled,
  type,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type ?? "button"}
      disabled={disabled || busy}
      aria-busy={busy || undefined}
      className={clsx(buttonClass(tone, big), className)}
    >
      {busy ? (busyLabel ?? "Working") : children}
    </button>
  );
}

/** A link that looks like a button, for going somewhere or opening a file. */
export function ButtonLink({
  tone = "plain",
  big,
  className,
  ...rest
}: ComponentProps<typeof Link> & {
  readonly tone?: ButtonTone;
  readonly big?: boolean;
  readonly children: ReactNode;
}) {
  return <Link {...rest} className={clsx(buttonClass(tone, big), className)} />;
}
