import type { ReactNode } from 'react'

const shapes = {
  plus: <path d="M8 3v10M3 8h10" />,
  search: <path d="M7 2.8a4.2 4.2 0 1 0 0 8.4 4.2 4.2 0 0 0 0-8.4M10.2 10.2l3.3 3.3" />,
  undo: <path d="M3 6.5h6.2a3.6 3.6 0 0 1 0 7.2H6M5.6 3.8L3 6.5l2.6 2.7" />,
  redo: <path d="M13 6.5H6.8a3.6 3.6 0 0 0 0 7.2H10M10.4 3.8L13 6.5l-2.6 2.7" />,
  tick: <path d="M3.2 8.4l3 3 6.6-7" />,
  cross: <path d="M4 4l8 8M12 4l-8 8" />,
  down: <path d="M4 6.2l4 4 4-4" />,
  up: <path d="M4 9.8l4-4 4 4" />,
  left: <path d="M9.8 4l-4 4 4 4" />,
  right: <path d="M6.2 4l4 4-4 4" />,
  more: <path d="M3.5 8h.01M8 8h.01M12.5 8h.01" strokeWidth="2.2" />,
  offline: <path d="M2.5 6.5a8 8 0 0 1 11 0M5 9.2a4.6 4.6 0 0 1 6 0M8 12h.01M3 3l10 10" />,
  copy: <path d="M6 6h7v7H6zM10 6V3H3v7h3" />,
  remove: <path d="M3 4.5h10M6.2 4.5V3h3.6v1.5M4.4 4.5l.6 8.5h6l.6-8.5" />,
  download: <path d="M8 2.8v7.4M4.8 7.4L8 10.4l3.2-3M3 13.2h10" />,
  sun: (
    <>
      <circle cx="8" cy="8" r="2.6" />
      <path d="M8 1.8v1.4M8 12.8v1.4M1.8 8h1.4M12.8 8h1.4M3.6 3.6l1 1M11.4 11.4l1 1M12.4 3.6l-1 1M4.6 11.4l-1 1" />
    </>
  ),
  moon: <path d="M12.9 9.6A5.4 5.4 0 0 1 6.4 3.1a5.4 5.4 0 1 0 6.5 6.5z" />,
  fit: <path d="M2.8 6V2.8H6M10 2.8h3.2V6M13.2 10v3.2H10M6 13.2H2.8V10" />,
  minus: <path d="M3 8h10" />,
} satisfies Record<string, ReactNode>

export type IconName = keyof typeof shapes

/** A small line drawing of 16 px beside a word; it never stands for one alone, so it is hidden from readers. */
export function Icon({ name, size = 16 }: { name: IconName; size?: number }) {
  return (
    <svg
      width={size}
      height={size}
      viewBox="0 0 16 16"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.4"
      strokeLinecap="round"
      strokeLinejoin="round"
      aria-hidden="true"
      className="inline-block flex-none"
    >
      {shapes[name]}
    </svg>
  )
}
