const shapes = {
  forward: 'M3 10h13M11 5l5 5-5 5',
  back: 'M17 10H4M9 5l-5 5 5 5',
  plus: 'M10 4v12M4 10h12',
  minus: 'M4 10h12',
  check: 'M4 10.5l4 4 8-9',
  close: 'M5 5l10 10M15 5L5 15',
  menu: 'M3 5.5h14M3 10h14M3 14.5h14',
  previous: 'M12.5 4l-6 6 6 6',
  next: 'M7.5 4l6 6-6 6',
  down: 'M4 7.5l6 6 6-6',
  warning: 'M10 3v9.5M10 16v.6',
} as const;

export type IconName = keyof typeof shapes;

/** Always beside or under words that say the same: hidden from screen readers. Drawn on a grid of 20. */
export function Icon({ name, size = 20 }: { name: IconName; size?: number }) {
  return (
    <svg
      className="w-icon"
      width={size}
      height={size}
      viewBox="0 0 20 20"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.9"
      strokeLinecap="square"
      aria-hidden="true"
    >
      <path d={shapes[name]} />
    </svg>
  );
}
