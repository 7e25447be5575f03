import { EXPORT_FORMATS } from '../exports/formats';
import { Step } from './plan-steps';

/** The files a plan can be taken out as. */
export function ExportMenu({ operationId, season }: { operationId: string; season: number }) {
  return (
    <Step label="Export">
      <ul>
        {EXPORT_FORMATS.map((format) => (
          <li key={format.id}>
            <a
              href={`/api/v1/plans/${operationId}/${season}/export?format=${format.id}`}
              download
              className="flex min-h-11 items-center underline decoration-line underline-offset-4 hover:decoration-ink lg:min-h-9"
            >
              {format.label}
            </a>
          </li>
        ))}
      </ul>
    </Step>
  );
}
