import { parseEnvironment, type Environment } from '@/lib/contracts/environment';

let cached: Environment | undefined;

/** The checked environment of this process. Throws `EnvironmentError` when a variable is missing. */
export function environment(): Environment {
  cached ??= parseEnvironment(process.env);
  return cached;
}
