/**
 * Buttons. ActButton is the one thing to do in a view (ink and paper reversed), QuietButton what
 * else can be done, TextButton an action inside a line of text. ActLink goes somewhere instead.
 */
import type { ButtonHTMLAttributes, Ref } from 'react';
import { Link } from 'react-router-dom';
import type { LinkProps } from 'react-router-dom';
import { classes } from './classes.ts';

const ACT =
  'inline-block rounded bg-ink px-14 py-[5px] font-mono text-label leading-[22px] text-sheet no-underline disabled:opacity-60';
const QUIET =
  'inline-block rounded border border-rule px-8 py-[3px] font-mono text-label leading-[22px] text-ink-2 no-underline hover:border-ink-3 hover:text-ink disabled:opacity-60';
const TEXT =
  'font-normal min-h-28 rounded px-4 font-mono text-label text-ultramarine underline decoration-1 underline-offset-[3px] disabled:opacity-60';

interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  readonly ref?: Ref<HTMLButtonElement>;
}

export function ActButton({ className, type = 'button', ...rest }: ButtonProps) {
  return <button type={type} className={classes(ACT, className)} {...rest} />;
}

export function QuietButton({ className, type = 'button', ...rest }: ButtonProps) {
  return <button type={type} className={classes(QUIET, className)} {...rest} />;
}

export function TextButton({ className, type = 'button', ...rest }: ButtonProps) {
  return <button type={type} className={classes(TEXT, className)} {...rest} />;
}

export function ActLink({ className, ...rest }: LinkProps) {
  return <Link className={classes(ACT, className)} {...rest} />;
}

export function QuietLink({ className, ...rest }: LinkProps) {
  return <Link className={classes(QUIET, className)} {...rest} />;
}

/** The class of ActLink, for an anchor that leaves the application (a sign-in at the provider). */
export const actClass = ACT;
export const quietClass = QUIET;
