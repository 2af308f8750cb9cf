import { ICONS, type IconName } from './icons';

export interface IconProps {
  readonly name: IconName;
  /** Names the icon for those who do not see it; without it the icon is decoration beside a word. */
  readonly label?: string;
  readonly className?: string;
}

export function Icon({ name, label, className }: IconProps) {
  return (
    <svg
      className={className ? `icon ${className}` : 'icon'}
      viewBox="0 0 24 24"
      width="20"
      height="20"
      role={label ? 'img' : undefined}
      aria-label={label}
      aria-hidden={label ? undefined : true}
    >
      <path d={ICONS[name]} />
    </svg>
  );
}
