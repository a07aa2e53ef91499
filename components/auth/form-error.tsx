/** What the server said about the whole form. */
export function FormError({ message }: { message: string | null }) {
  if (!message) return null;
  return (
    <p role="alert" className="border-fail text-fail border-l-2 pl-3 text-sm">
      {message}
    </p>
  );
}
