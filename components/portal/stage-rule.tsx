import { JOB_STAGE_NAMES, JOB_STAGES, type JobStage } from '@/lib/contracts/states';
import { classNames } from '@/components/ui/class-names';

/** The stages of a job as marks on a rule: what is behind is inked, the present one is named in the brand's colour. */
export function StageRule({ stage }: { stage: JobStage }) {
  const now = JOB_STAGES.indexOf(stage);
  return (
    <ol aria-label="Stages of the job" className="grid md:grid-flow-col md:auto-cols-fr">
      {JOB_STAGES.map((one, index) => (
        <li
          key={one}
          aria-current={index === now ? 'step' : undefined}
          className={classNames(
            'relative flex min-h-8 items-center gap-3 border-l-4 pl-3 md:block md:min-h-14 md:border-t-4 md:border-l-0 md:pt-2 md:pr-2 md:pl-0',
            index < now ? 'border-ink' : index === now ? 'border-brand' : 'border-hairline text-quiet',
            index === now && 'font-semibold text-brand',
          )}
        >
          <span className="text-label">{JOB_STAGE_NAMES[one]}</span>
          {index < now && <span className="sr-only">, done</span>}
        </li>
      ))}
    </ol>
  );
}
