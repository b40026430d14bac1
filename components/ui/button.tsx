import Link from 'next/link';
import type { ButtonHTMLAttributes, ReactNode } from 'react';

/** filled: once a page at most; outline: the rest; checker: the checker's acts only. */
export type ButtonLook = 'filled' | 'outline' | 'checker';

interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  readonly look?: ButtonLook;
}

/** A button says what it does and to how many: "Run 232 frames". */
export function Button({ look = 'outline', type = 'button', className, ...rest }: ButtonProps) {
  return <button type={type} className={`btn btn-${look} ${className ?? ''}`} {...rest} />;
}

interface ButtonLinkProps {
  readonly href: string;
  readonly look?: ButtonLook;
  /** The address answers with a file. */
  readonly download?: boolean;
  readonly children: ReactNode;
}

/** Looks like a button, goes somewhere: a page, or a file to keep. */
export function ButtonLink({ href, look = 'outline', download = false, children }: ButtonLinkProps) {
  const className = `btn btn-${look}`;
  return download ? (
    <a className={className} href={href} download>
      {children}
    </a>
  ) : (
    <Link className={className} href={href}>
      {children}
    </Link>
  );
}
