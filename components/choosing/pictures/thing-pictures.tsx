import type {
  Counter,
  DrawerBoxOption,
  EndTreatment,
  Overlay,
  Pull,
  Storage,
} from '@/lib/engine/edition-types';
import { NonePicture, Paper } from './paper';

const n = (value: number): string => value.toFixed(2);

/** A pull in its own colour; an inch between its screws is 18 units. */
export function PullPicture({ pull }: { pull: Pull }) {
  if (pull.form === 'none') return <NonePicture />;
  const length = Math.min(112, Math.max(44, (pull.centres / 64) * 18));
  const left = 75 - length / 2;
  return (
    <Paper>
      <g fill={pull.colour} strokeWidth="1">
        {pull.form === 'knob' && (
          <>
            <circle cx="75" cy="48" r="15" />
            <circle cx="75" cy="48" r="9" strokeOpacity="0.5" />
            <path d="M66 42 A11 11 0 0 1 75 37" stroke="#fff" strokeOpacity="0.7" fill="none" />
          </>
        )}
        {pull.form === 'bar' && (
          <>
            <rect x={n(left + 4)} y="40" width="7" height="16" />
            <rect x={n(left + length - 11)} y="40" width="7" height="16" />
            <rect x={n(left - 6)} y="43" width={n(length + 12)} height="10" rx="5" />
            <path d={`M${n(left)} 45.5 H${n(left + length)}`} stroke="#fff" strokeOpacity="0.6" />
          </>
        )}
        {pull.form === 'arch' && (
          <path
            d={`M${n(left - 6)} 58 V52 C${n(left)} 34 ${n(left + length)} 34 ${n(left + length + 6)} 52 V58 H${n(left + length - 4)} C${n(left + length - 12)} 46 ${n(left + 12)} 46 ${n(left + 4)} 58 Z`}
          />
        )}
        {pull.form === 'cup' && (
          <>
            <path
              d={`M${n(left - 4)} 58 C${n(left - 4)} 28 ${n(left + length + 4)} 28 ${n(left + length + 4)} 58 Z`}
            />
            <path d={`M${n(left - 8)} 58 H${n(left + length + 8)}`} strokeWidth="2" />
          </>
        )}
      </g>
    </Paper>
  );
}

/** Two doors on a stile: how much of the frame is left to see. */
export function OverlayPicture({ overlay, colour }: { overlay: Overlay; colour: string }) {
  const unit = 20 / 64;
  const stile = 3 * 64 * unit * 0.5;
  const cover = Math.min(overlay.amount * unit, stile / 2 - 1);
  const left = 75 - stile / 2;
  return (
    <Paper>
      <rect
        x={n(left)}
        y="4"
        width={n(stile)}
        height="88"
        fill={`color-mix(in oklab, ${colour}, white 35%)`}
      />
      <rect x="10" y="12" width={n(left + cover - 10)} height="76" fill={colour} strokeWidth="1.4" />
      <rect
        x={n(75 + stile / 2 - cover)}
        y="12"
        width={n(140 - (75 + stile / 2 - cover))}
        height="76"
        fill={colour}
        strokeWidth="1.4"
      />
    </Paper>
  );
}

/** The side of a cabinet, flat or framed. */
export function EndPicture({ end, colour }: { end: EndTreatment; colour: string }) {
  return (
    <Paper>
      <rect x="42" y="8" width="66" height="80" fill={colour} strokeWidth="1.4" stroke="var(--on-blade)" />
      {end.kind === 'panelled' && (
        <>
          <rect x="53" y="19" width="44" height="58" />
          <rect x="56" y="22" width="38" height="52" strokeOpacity="0.5" strokeWidth="0.6" />
        </>
      )}
    </Paper>
  );
}

/** A drawer's box seen from above its corner; dashed when the present one stays. */
export function DrawerBoxPicture({ box }: { box: DrawerBoxOption }) {
  const keeps = box.material === 'none';
  return (
    <Paper>
      <g strokeDasharray={keeps ? '5 3' : undefined} strokeOpacity={keeps ? 0.7 : 1}>
        <path d="M28 46 L76 66 L122 44 L74 26 Z" fill={box.material === 'birch' ? '#e2cda4' : 'none'} />
        <path d="M28 46 V64 L76 85 V66 M76 85 L122 62 V44" />
        {!keeps && <path d="M34 46 L76 63 L116 44 L74 29 Z" strokeWidth="0.7" />}
      </g>
    </Paper>
  );
}

/** A counter's front edge over the cabinet. */
export function CounterPicture({ counter }: { counter: Counter }) {
  const keeps = counter.kind === 'keep';
  const thick = Math.max(6, Math.min(26, (counter.thickness / 64) * 12));
  return (
    <Paper>
      <path d="M34 96 V48 H150" strokeOpacity="0.6" />
      <path
        d={`M24 ${n(48 - thick)} H150 V48 H24 Z`}
        strokeWidth="1.4"
        strokeDasharray={keeps ? '5 3' : undefined}
        fill={keeps ? 'none' : 'url(#hatch)'}
      />
      {counter.kind === 'allowance' && (
        <path d={`M24 ${n(48 - thick)} L60 20 H150`} strokeOpacity="0.5" strokeDasharray="3 3" />
      )}
    </Paper>
  );
}

/** What is put inside an opening. */
export function StoragePicture({ storage }: { storage: Storage }) {
  if (storage.kind === 'none') return <NonePicture />;
  return (
    <Paper>
      <rect x="45" y="8" width="60" height="80" strokeOpacity="0.6" />
      {storage.kind === 'pullOut' && (
        <path d="M50 40 H100 V48 H50 Z M50 40 L36 50 V58 L50 48 M36 50 H88 L100 40 M50 72 H100 V80 H50 Z M36 58 H88 L100 48" />
      )}
      {storage.kind === 'trayDivider' && (
        <path d="M58 12 V86 M70 12 V86 M82 12 V86 M94 12 V86" strokeWidth="2" />
      )}
      {storage.kind === 'bin' && (
        <path d="M54 40 H74 L72 84 H56 Z M78 40 H98 L96 84 H80 Z M52 40 H76 M76 40 H100" />
      )}
    </Paper>
  );
}
