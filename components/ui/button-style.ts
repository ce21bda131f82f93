import { classes } from '@/components/ui/classes';

export type ButtonKind = 'primary' | 'secondary' | 'quiet' | 'danger';

const KINDS: Record<ButtonKind, string> = {
  primary: 'border-spin bg-spin text-spin-on hover:border-spin-deep hover:bg-spin-deep',
  secondary: 'border-ink-2 bg-sheet text-ink hover:border-ink hover:bg-hover',
  quiet: 'border-transparent text-spin underline underline-offset-4 decoration-1 hover:decoration-2',
  danger: 'border-limit bg-sheet text-limit hover:bg-hover',
};

export function buttonClass(kind: ButtonKind, extra?: string): string {
  return classes(
    'inline-flex min-h-8 items-center justify-center gap-2 rounded border py-1 text-body font-semibold select-none',
    'pointer-coarse:min-h-11 disabled:cursor-not-allowed disabled:border-rule disabled:bg-transparent disabled:text-ink-2',
    'no-print cursor-pointer text-center no-underline',
    kind === 'quiet' ? 'px-0' : 'px-4',
    KINDS[kind],
    extra,
  );
}
