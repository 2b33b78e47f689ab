import type { Sixtyfourths } from '@/lib/engine/types';
import { formatLength } from '@/lib/engine/length';

/** A length as the tape reads it, to the nearest 1/16 in, with a true fraction. */
export function Length({ value }: { value: Sixtyfourths }) {
  return <LengthText text={formatLength(value)} />;
}

/** Sets `3 1/4` inside a sentence as whole number, true fraction and, where present, inch mark. */
export function LengthText({ text }: { text: string }) {
  const pieces = text.split(/(\d+\/\d+|["″])/);
  return (
    <span className="tabular-nums">
      {pieces.map((piece, index) =>
        /^\d+\/\d+$/.test(piece) ? (
          <span key={index} className="length-fraction">
            {piece}
          </span>
        ) : piece === '"' || piece === '″' ? (
          <span key={index} className="inch-mark">
            ″
          </span>
        ) : (
          piece
        ),
      )}
    </span>
  );
}
