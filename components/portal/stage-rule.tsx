import { JOB_STAGE_NAMES, JOB_STAGES, type JobStage } from '@/lib/contracts/states';
import { classNames } from '@/components/ui/class-names';

/** The stages of a job as a rule: what is behind is inked, the present one is named in the brand's colour. */
export function StageRule({ stage }: { stage: JobStage }) {
  const now = JOB_STAGES.indexOf(stage);
  const after = JOB_STAGES[now + 1];
  return (
    <>
      <ol aria-label="Stages of the job" className="grid auto-cols-fr grid-flow-col gap-1 md:gap-0">
        {JOB_STAGES.map((one, index) => (
          <li
            key={one}
            aria-current={index === now ? 'step' : undefined}
            className={classNames(
              'border-t-8 md:min-h-13 md:border-t-4 md:pt-2 md:pr-2',
              index < now ? 'border-ink' : index === now ? 'border-brand' : 'border-hairline text-quiet',
              index === now && 'font-semibold text-brand',
            )}
          >
            <span className="sr-only text-label md:not-sr-only">{JOB_STAGE_NAMES[one]}</span>
            {index < now && <span className="sr-only">, done</span>}
          </li>
        ))}
      </ol>
      <p aria-hidden="true" className="mt-2 md:hidden">
        <span className="font-semibold text-brand">{JOB_STAGE_NAMES[stage]}</span>
        <span className="text-quiet">{after ? `, then ${JOB_STAGE_NAMES[after].toLowerCase()}` : ''}</span>
      </p>
    </>
  );
}
