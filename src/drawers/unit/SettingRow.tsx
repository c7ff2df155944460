import { memo } from 'react';
import type { Finding } from '../../engine/outcome';
import { LimitMark } from '../../parts/LimitMark';
import { useSay } from '../useSay';
import { useForm } from './useForm';

/** A missing value is told by the field itself and by the drawer's head. */
const MARKED = new Set(['sketch/needs-value', 'sketch/needs-one-of']);

/** What is to be said about one setting, under its field. */
export function FieldFindings({ path }: { readonly path: string }) {
  const { findings } = useForm();
  const here = findings.filter((finding) => finding.at.path === path && !MARKED.has(finding.code));
  return <FieldFindingList findings={here} />;
}

export function FieldFindingList({ findings }: { readonly findings: readonly Finding[] }) {
  if (findings.length === 0) return null;
  return (
    <ul className="field-findings">
      {findings.map((finding) => (
        <FieldFinding key={`${finding.code} ${finding.at.port} ${finding.at.chemical}`} finding={finding} />
      ))}
    </ul>
  );
}

const FieldFinding = memo(function FieldFinding({ finding }: { readonly finding: Finding }) {
  const say = useSay();
  const { sentence, next } = say(finding);
  return (
    <li>
      <LimitMark weight={finding.weight} />
      <span>
        {sentence} {next ? <span className="next">{next}</span> : null}
      </span>
    </li>
  );
});

interface Props {
  readonly label: React.ReactNode;
  readonly path: string;
  readonly children: React.ReactNode;
  /** The control takes the whole width, under its label. */
  readonly wide?: boolean;
}

/** Label, control, and below it what there is to say. */
export function SettingRow({ label, path, children, wide = false }: Props) {
  return (
    <div className={wide ? 'setting wide' : 'setting'}>
      <div className="setting-label">{label}</div>
      <div className="setting-control">
        {children}
        <FieldFindings path={path} />
      </div>
    </div>
  );
}
