'use client';

import { useState, type ReactNode } from 'react';
import { Dialog } from '@/components/ui/dialog';

export type Word = 'overlay' | 'crown' | 'lightRail' | 'base' | 'ends' | 'drawerBox' | 'fillerStrip';

interface Entry {
  readonly name: string;
  readonly meaning: string;
  /** A drawing of 240 by 150 units in ink; what the word means is in the brand's colour. */
  readonly figure: ReactNode;
}

const MEANT = { className: 'text-brand', stroke: 'currentColor', fill: 'currentColor', fillOpacity: 0.22 };

/** Words of the trade, each in one or two plain sentences with a drawing. */
const WORDS: Readonly<Record<Word, Entry>> = {
  overlay: {
    name: 'Overlay',
    meaning:
      'How far a door laps over the frame round its opening. A small overlay leaves much of the frame to see; a large one nearly hides it.',
    figure: (
      <>
        <rect x="95" y="15" width="50" height="120" />
        <path d="M20 25 H112 V125 H20 M220 25 H128 V125 H220" strokeWidth="2" />
        <g {...MEANT}>
          <rect x="95" y="25" width="17" height="100" />
          <rect x="128" y="25" width="17" height="100" />
        </g>
      </>
    ),
  },
  crown: {
    name: 'Crown',
    meaning:
      'The moulding along the top of the wall cabinets, which leans out and closes the gap to the ceiling. A tall one may cover part of the frame, so that doors become a little shorter.',
    figure: (
      <>
        <path d="M20 14 H220" strokeWidth="2" />
        <path d="M60 60 V140 M200 60 V140 M60 66 H200" />
        <path d="M72 78 H126 V140 M134 140 V78 H188 V140" />
        <path {...MEANT} d="M60 60 L40 16 H220 L200 60 Z" />
      </>
    ),
  },
  lightRail: {
    name: 'Light rail',
    meaning: 'A narrow moulding under the wall cabinets that hides a lamp fixed beneath them.',
    figure: (
      <>
        <path d="M50 14 V104 H190 V14 M62 14 V92 H116 V14 M124 14 V92 H178 V14" />
        <rect {...MEANT} x="50" y="104" width="140" height="18" />
        <path d="M100 124 L84 146 M140 124 L156 146" strokeDasharray="4 3" />
      </>
    ),
  },
  base: {
    name: 'Base moulding',
    meaning:
      'The moulding along the foot of the base cabinets, in front of the toe space. It stays below the doors, so that they open.',
    figure: (
      <>
        <path d="M20 140 H220" strokeWidth="2" />
        <path d="M50 14 V112 M190 14 V112 M62 14 V104 H116 V14 M124 14 V104 H178 V14" />
        <rect {...MEANT} x="44" y="112" width="152" height="28" />
      </>
    ),
  },
  ends: {
    name: 'Exposed end',
    meaning:
      'The side of a cabinet that can be seen, at the end of a row. It gets a panel of the same wood, flat or framed.',
    figure: (
      <>
        <path d="M40 40 H130 V140 H40 Z M50 50 H80 V130 H50 Z M90 50 H120 V130 H90 Z" />
        <path {...MEANT} d="M130 40 L200 14 V114 L130 140 Z" />
      </>
    ),
  },
  drawerBox: {
    name: 'Drawer box',
    meaning:
      'The box behind a drawer’s front, and the slides on which it runs. The present ones can stay, or be made anew with soft-close slides.',
    figure: (
      <>
        <path d="M30 70 H110 V130 H30 Z" />
        <path {...MEANT} d="M42 70 L90 24 H206 V78 L110 116 V70 Z" />
        <path d="M110 70 L206 24" />
      </>
    ),
  },
  fillerStrip: {
    name: 'Filler strip',
    meaning:
      'A strip of wood set into the top of an opening, veneered over with the frame, where the crown would otherwise meet the door. The door is ordered shorter by as much.',
    figure: (
      <>
        <path d="M50 20 H190 V140 M50 20 V140 M70 44 V140 M170 44 V140 M70 44 H170" />
        <rect {...MEANT} x="70" y="44" width="100" height="16" />
        <path d="M64 68 H176 V140 M64 68 V140" strokeWidth="2" />
      </>
    ),
  },
};

/** A word of the trade, dotted under; pressed, it is explained with a drawing. */
export function TradeWord({ word, children }: { word: Word; children?: ReactNode }) {
  const [open, setOpen] = useState(false);
  const entry = WORDS[word];
  return (
    <>
      <button
        type="button"
        aria-haspopup="dialog"
        onClick={() => setOpen(true)}
        className="underline decoration-dotted decoration-2 underline-offset-4"
      >
        {children ?? entry.name}
      </button>
      <Dialog open={open} onOpenChange={setOpen} title={entry.name}>
        <div className="grid gap-5 md:grid-cols-[15rem_1fr] md:items-center">
          <svg
            viewBox="0 0 240 150"
            className="w-full max-w-60"
            aria-hidden="true"
            fill="none"
            stroke="currentColor"
            strokeWidth="1.2"
            strokeLinejoin="round"
          >
            {entry.figure}
          </svg>
          <p>{entry.meaning}</p>
        </div>
      </Dialog>
    </>
  );
}

/** Whether a decision's title is a word that wants explaining. */
export const isTradeWord = (key: string): key is Word => key in WORDS;
