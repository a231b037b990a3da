import type { ButtonHTMLAttributes, ReactNode } from 'react'
import { Link, type LinkProps } from 'react-router'
import { Icon, type IconName } from '#app/components/icons.tsx'

type Kind = 'primary' | 'outline' | 'text' | 'danger'
type Size = 'small' | 'normal' | 'large'

const kinds: Record<Kind, string> = {
  primary:
    'border-ember bg-ember text-on-ember hover:border-ember-deep hover:bg-ember-deep active:border-ember-deep active:bg-ember-deep',
  outline: 'border-rule-strong bg-transparent text-ink hover:bg-paper-sunk',
  text: 'border-transparent bg-transparent text-ink-2 hover:bg-paper-sunk hover:text-ink',
  danger: 'border-clay bg-transparent text-clay hover:bg-clay-wash',
}

const sizes: Record<Size, string> = {
  small: 'h-7 px-2.5 pointer-coarse:h-11',
  normal: 'h-8 px-3 pointer-coarse:h-11',
  large: 'h-12 px-5 text-base',
}

/** The class names of a button, for elements that look like one. */
export function buttonClass(kind: Kind = 'outline', size: Size = 'normal'): string {
  return `inline-flex flex-none items-center justify-center gap-1.5 rounded-md border font-medium whitespace-nowrap transition-colors duration-120 select-none disabled:cursor-not-allowed disabled:border-rule disabled:bg-transparent disabled:text-ink-3 ${kinds[kind]} ${sizes[size]}`
}

interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  kind?: Kind
  size?: Size
  icon?: IconName
}

/** A verb. One primary on a page. A button inside a form submits only when its type says so. */
export function Button({ kind, size, icon, children, className = '', type = 'button', ...rest }: ButtonProps) {
  return (
    <button type={type} className={`${buttonClass(kind, size)} ${className}`} {...rest}>
      {icon && <Icon name={icon} />}
      {children}
    </button>
  )
}

interface IconButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  icon: IconName
  /** The verb; it is the accessible name and the tip. */
  label: string
}

/** A verb so common that its drawing is enough to see; its word stays for readers and as a tip. */
export function IconButton({ icon, label, className = '', ...rest }: IconButtonProps) {
  return (
    <button
      type="button"
      aria-label={label}
      title={label}
      className={`inline-flex size-8 flex-none items-center justify-center rounded-md text-ink-2 transition-colors duration-120 hover:bg-paper-sunk hover:text-ink disabled:cursor-not-allowed disabled:text-ink-3/60 disabled:hover:bg-transparent pointer-coarse:size-11 ${className}`}
      {...rest}
    >
      <Icon name={icon} />
    </button>
  )
}

interface ButtonLinkProps extends LinkProps {
  kind?: Kind
  size?: Size
  icon?: IconName
  children: ReactNode
}

/** A link to a page that is the next thing to do. */
export function ButtonLink({ kind, size, icon, children, className = '', ...rest }: ButtonLinkProps) {
  return (
    <Link className={`${buttonClass(kind, size)} ${className}`} {...rest}>
      {icon && <Icon name={icon} />}
      {children}
    </Link>
  )
}
