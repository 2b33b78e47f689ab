/** A number that can be called at a touch. */
export function Telephone({ phone, className }: { phone: string; className?: string }) {
  return (
    <a href={`tel:${phone.replace(/[^\d+]/g, '')}`} className={className ?? 'whitespace-nowrap underline'}>
      {phone}
    </a>
  );
}
