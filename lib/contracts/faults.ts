import type { z } from 'zod';

/** Every fault of an input by path, such as `cabinets.3.width`, for whoever has to mend it. */
export function faultsOf(error: z.ZodError): { path: string; message: string }[] {
  return error.issues.map(({ path, message }) => ({
    path: path.length > 0 ? path.map(String).join('.') : '(whole)',
    message,
  }));
}
