import { type BufferGeometry, CapsuleGeometry, CylinderGeometry, SphereGeometry, TorusGeometry } from 'three';
import type { Pull } from '@/lib/engine/edition-types';
import { metres } from './space';

/** A pull's form, its length along x, its middle at the origin, standing out along z. `null` where there is none. */
export function pullGeometry(pull: Pull): BufferGeometry | null {
  const out = metres(pull.projection);
  const span = Math.max(metres(pull.centres), 0.05);
  switch (pull.form) {
    case 'none':
      return null;
    case 'knob':
      return new SphereGeometry(0.015, 20, 14).scale(1, 1, 0.75).translate(0, 0, out * 0.75);
    case 'bar':
      return new CapsuleGeometry(0.0052, span + 0.03, 6, 14).rotateZ(Math.PI / 2).translate(0, 0, out);
    case 'arch':
      return new TorusGeometry(span / 2, 0.005, 10, 28, Math.PI)
        .rotateX(Math.PI / 2)
        .scale(1, 1, (out * 2) / span);
    case 'cup':
      return new CylinderGeometry(0.02, 0.024, span, 20, 1, false, 0, Math.PI)
        .rotateZ(Math.PI / 2)
        .translate(0, 0, 0.004);
  }
}
