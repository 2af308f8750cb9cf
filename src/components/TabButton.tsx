import type { AnchorHTMLAttributes, ButtonHTMLAttributes } from 'react';

type TabButtonProps = (
  | ({ readonly href: string } & AnchorHTMLAttributes<HTMLAnchorElement>)
  | ({ readonly href?: undefined } & ButtonHTMLAttributes<HTMLButtonElement>)
) & { readonly small?: boolean };

/** The one main action of a place. A link when it has an address, a button otherwise. */
export function TabButton({ small, className, ...rest }: TabButtonProps) {
  const classes = ['tab-button', small ? 'small-tab' : '', className ?? ''].filter(Boolean).join(' ');
  if (rest.href !== undefined) return <a {...rest} className={classes} />;
  return <button type="button" {...rest} className={classes} />;
}
