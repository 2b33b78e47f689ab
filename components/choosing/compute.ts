import { massing } from '@/lib/engine/massing';
import { optionStates } from '@/lib/engine/options';
import { takeoff } from '@/lib/engine/takeoff';

/** The computation of the screen in one place: the same functions decide on the server. */
export { massing, optionStates, takeoff };
