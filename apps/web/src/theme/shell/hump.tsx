/** The hump that the present page raises on the horizon line. */
export function Hump({ className }: { readonly className?: string | undefined }) {
  return (
    <svg className={className} width="56" height="10" viewBox="0 0 56 10" aria-hidden="true" focusable="false">
      <path d="M0 10 C15 9 17 1 28 1 S41 9 56 10 Z" fill="var(--sk-deep)" />
    </svg>
  );
}
