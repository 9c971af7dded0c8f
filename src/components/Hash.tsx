/** The hash of a version, by its first eight digits; all of it on hovering. */
export function shortHash(hash: string): string {
  return `${hash.slice(0, 4)} ${hash.slice(4, 8)}`;
}

export function Hash({ hash }: { readonly hash: string }) {
  return (
    <span title={`SHA-256 of the normalized source: ${hash}`} className="whitespace-nowrap">
      {shortHash(hash)}
    </span>
  );
}
