/** Our mark: a ring, opened where a wave comes in. Decorative; the name stands beside it. */
export function Mark({ size = 24 }: { size?: number }) {
  return (
    <svg
      width={size}
      height={size}
      viewBox="0 0 32 32"
      fill="none"
      strokeLinecap="round"
      strokeWidth={2.5}
      aria-hidden="true"
    >
      <path className="stroke-ink" d="M9.6 10.3A10 10 0 1 1 9.6 23.7" />
      <path className="stroke-copper" d="M1.5 17h5c2.6 0 2.9-5.5 5.2-5.5s2.3 9 4.6 9 2-5 3.7-5" />
    </svg>
  );
}
