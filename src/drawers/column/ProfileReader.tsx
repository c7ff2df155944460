import { useState } from 'react';
import type { ProfileData, ProfilePicture, ProfilePlace } from '../../drawing/profiles';
import { nearestPlace, placesOf, pointsAt, readingAt } from './readings';

interface Props {
  readonly data: ProfileData;
  readonly picture: ProfilePicture;
  readonly children: React.ReactNode;
}

const PAGE = 5;

/** The profiles read off stage by stage: under the pointer, or with the arrow keys. */
export function ProfileReader({ data, picture, children }: Props) {
  const [wanted, setWanted] = useState<ProfilePlace | null>(null);
  const places = placesOf(data);
  const last = places.length - 1;
  // Another result may have fewer stages.
  const here = wanted !== null && places.includes(wanted) ? wanted : null;
  const at = here === null ? -1 : places.indexOf(here);
  const reading = here === null ? null : readingAt(data, here);
  const points = here === null ? [] : pointsAt(picture, here);
  const y = points[0]?.[1];
  const [left, right] = [picture.plots[0]?.box.x ?? 0, picture.width];
  const put = (to: number): void => setWanted(places[Math.min(last, Math.max(0, to))] ?? null);
  return (
    <>
      <div className="profile-reader">
        {children}
        {y === undefined ? null : (
          <svg className="reading-mark" width={picture.width} height={picture.height} aria-hidden="true">
            <path d={`M${left} ${y}H${right}`} />
            {points.map(([px, py]) => (
              <circle key={`${px} ${py}`} cx={px} cy={py} r={3.2} />
            ))}
          </svg>
        )}
        <div
          className="reading-hand"
          role="slider"
          tabIndex={0}
          aria-label="Place read off the profiles"
          aria-orientation="vertical"
          aria-valuemin={0}
          aria-valuemax={last}
          aria-valuenow={Math.max(0, at)}
          aria-valuetext={reading ? `${reading.place}: ${reading.values.join('; ')}` : 'none yet'}
          onPointerMove={(event) => {
            const top = event.currentTarget.getBoundingClientRect().top;
            setWanted(nearestPlace(picture, event.clientY - top) ?? null);
          }}
          onPointerLeave={(event) => {
            if (document.activeElement !== event.currentTarget) setWanted(null);
          }}
          onFocus={() => {
            if (at < 0) put(0);
          }}
          onBlur={() => setWanted(null)}
          onKeyDown={(event) => {
            const to = {
              ArrowDown: at + 1,
              ArrowRight: at + 1,
              ArrowUp: at - 1,
              ArrowLeft: at - 1,
              PageDown: at + PAGE,
              PageUp: at - PAGE,
              Home: 0,
              End: last,
            }[event.key];
            if (to === undefined || event.altKey || event.ctrlKey || event.metaKey) return;
            event.preventDefault();
            put(to);
          }}
        />
      </div>
      <p className="reading" data-reading={here ?? undefined}>
        {reading ? (
          <>
            <b>{reading.place}</b>
            {reading.values.map((value) => (
              <span key={value}>{value}</span>
            ))}
          </>
        ) : (
          <span className="muted">Point at a stage, or step through them with the arrow keys.</span>
        )}
      </p>
    </>
  );
}
