import { useId, useState } from 'react';
import type { VideoMoment } from '../document';
import { videoHref } from '../links';
import { momentText, readMoment } from '../video-moment';

export interface MomentFieldProps {
  readonly begin: VideoMoment | null;
  /** Address of the last moment before this one: mostly a write-up goes with one video. */
  readonly usualAddress: string;
  readonly onTake: (moment: VideoMoment | null) => void;
}

/** Where in a video a step begins. The reader gets a link; nothing of the other site is loaded. */
export function MomentField({ begin, usualAddress, onTake }: MomentFieldProps) {
  const id = useId();
  const [time, setTime] = useState(begin ? momentText(begin.seconds) : '');
  const [address, setAddress] = useState(begin ? (begin.address ?? '') : usualAddress);
  const [refused, setRefused] = useState<'time' | 'address' | null>(null);
  return (
    <form
      className="moment-field"
      onSubmit={(event) => {
        event.preventDefault();
        event.stopPropagation();
        const seconds = readMoment(time);
        const href = address.trim() === '' ? null : videoHref(address);
        if (seconds === null) return setRefused('time');
        if (address.trim() !== '' && href === null) return setRefused('address');
        onTake({ seconds, address: href });
      }}
    >
      <div className="moment-field-row">
        <div>
          <label htmlFor={`${id}-time`}>Begins at</label>
          <input
            id={`${id}-time`}
            className="input moment-time"
            autoFocus
            autoComplete="off"
            placeholder="4:12"
            maxLength={9}
            value={time}
            aria-invalid={refused === 'time' || undefined}
            aria-describedby={`${id}-said`}
            onChange={(event) => {
              setTime(event.target.value);
              setRefused(null);
            }}
          />
        </div>
        <div>
          <label htmlFor={`${id}-address`}>Address of the video</label>
          <input
            id={`${id}-address`}
            className="input"
            autoComplete="off"
            inputMode="url"
            placeholder="https://…"
            maxLength={2000}
            value={address}
            aria-invalid={refused === 'address' || undefined}
            aria-describedby={`${id}-said`}
            onChange={(event) => {
              setAddress(event.target.value);
              setRefused(null);
            }}
          />
        </div>
      </div>
      <div id={`${id}-said`} aria-live="polite">
        {refused === 'time' ? (
          <p className="error">Not a time. Write minutes and seconds with a colon: 4:12, or 1:04:12.</p>
        ) : null}
        {refused === 'address' ? (
          <p className="error">The address has to begin with https. Leave it empty when there is none yet.</p>
        ) : null}
      </div>
      <p className="hint">Readers get a link; the video is not loaded into the page.</p>
      <div className="link-field-actions">
        <button type="submit" className="btn small-btn">
          {begin ? 'Change it' : 'Put it in'}
        </button>
        {begin ? (
          <button type="button" className="btn small-btn" onClick={() => onTake(null)}>
            Take it away
          </button>
        ) : null}
      </div>
    </form>
  );
}
