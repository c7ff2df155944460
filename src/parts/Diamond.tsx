import { memo } from 'react';

/** A stream's number in its diamond; filled in accent when it is the one that is selected. */
export const Diamond = memo(function Diamond({
  number,
  chosen = false,
  size = 24,
}: {
  readonly number: string;
  readonly chosen?: boolean;
  readonly size?: number;
}) {
  const h = size / 2;
  return (
    <svg
      className={chosen ? 'stream-diamond chosen' : 'stream-diamond'}
      width={size}
      height={size}
      viewBox={`0 0 ${size} ${size}`}
      aria-hidden="true"
    >
      <path d={`M${h} 0.7 ${size - 0.7} ${h} ${h} ${size - 0.7} 0.7 ${h}Z`} />
      <text
        x={h}
        y={h + size * 0.165}
        textAnchor="middle"
        fontSize={number.length > 2 ? size * 0.38 : Math.max(10, size * 0.46)}
      >
        {number}
      </text>
    </svg>
  );
});
