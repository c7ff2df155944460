import type { ProfilePicture } from '../../drawing/profiles';
import type { Ink } from '../../drawing/types';

interface Props {
  readonly picture: ProfilePicture;
  /** The picture in words. */
  readonly label: string;
  /** An older result: everything lighter. */
  readonly stale: boolean;
}

/** The drawing's shapes in the drawer's own inks. */
export function Picture({ picture, label, stale }: Props) {
  const { width, height, paths, texts } = picture;
  const ink = (of: Ink | 'none'): string => {
    if (of === 'none') return 'none';
    if (of === 'paper') return 'var(--panel)';
    return stale && (of === 'ink' || of === 'ink2') ? 'var(--ink3)' : `var(--${of})`;
  };
  return (
    <svg
      className="profile-picture"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={label}
    >
      {paths.map((shape, k) => (
        <path
          // biome-ignore lint/suspicious/noArrayIndexKey: shapes have no names of their own
          key={k}
          d={shape.d}
          strokeWidth={shape.width}
          strokeDasharray={shape.dash}
          style={{ fill: ink(shape.fill), stroke: shape.width === 0 ? 'none' : ink(shape.stroke) }}
        />
      ))}
      {texts.map((shape, k) => (
        <text
          // biome-ignore lint/suspicious/noArrayIndexKey: shapes have no names of their own
          key={k}
          x={shape.at[0]}
          y={shape.at[1]}
          fontSize={shape.size}
          fontWeight={shape.weight}
          textAnchor={shape.anchor}
          fontStyle={stale ? 'italic' : undefined}
          style={{ fill: ink(shape.ink) }}
        >
          {shape.text}
        </text>
      ))}
    </svg>
  );
}
