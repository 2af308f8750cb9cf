import { useState } from 'react';
import useSWR from 'swr';
import { Segmented } from '@/components/Segmented';
import type { MailingView } from '../mailing-view';
import { fetchText } from './mailing-api';

type Width = '600' | '320';
type Part = 'html' | 'text';
type Units = 'in' | 'mm' | 'cm';

/** The mail as a made-up person gets it, from the server: the same that is sent. */
export function Preview({
  view,
  revision,
  subject,
  units: usual,
}: {
  readonly view: MailingView;
  readonly revision: number;
  readonly subject: string;
  readonly units: Units;
}) {
  const [width, setWidth] = useState<Width>('600');
  const [part, setPart] = useState<Part>('html');
  const [units, setUnits] = useState<Units>(usual);
  const address = `/api/mailings/${view.id}/preview?part=${part}&units=${units}&revision=${revision}`;

  return (
    <section className="mail-preview" aria-labelledby="preview-head">
      <div className="mail-preview-head">
        <h2 id="preview-head">As it will arrive</h2>
        <div className="mail-preview-choices">
          <Segmented
            legend="Width"
            quietLegend
            value={width}
            onChange={setWidth}
            options={[
              { value: '600', label: '600 px', disabled: part === 'text' },
              { value: '320', label: '320 px', disabled: part === 'text' },
            ]}
          />
          <Segmented
            legend="Part"
            quietLegend
            value={part}
            onChange={setPart}
            options={[
              { value: 'html', label: 'HTML' },
              { value: 'text', label: 'Plain text' },
            ]}
          />
          <Segmented
            legend="Sizes in"
            quietLegend
            value={units}
            onChange={setUnits}
            options={[
              { value: 'in', label: 'in' },
              { value: 'mm', label: 'mm' },
              { value: 'cm', label: 'cm' },
            ]}
          />
        </div>
      </div>
      <dl className="mail-envelope">
        <dt>From</dt>
        <dd>{view.from.name}</dd>
        <dt>To</dt>
        <dd>Sample Reader (a made-up name)</dd>
        <dt>Subject</dt>
        <dd className="strong">{subject || 'nothing yet'}</dd>
      </dl>
      <div className="mail-ground">
        {part === 'html' ? (
          <iframe key={address} className={`mail-sheet w${width}`} src={address} sandbox="" title="The mail as HTML" />
        ) : (
          <PlainText address={address} />
        )}
      </div>
    </section>
  );
}

function PlainText({ address }: { readonly address: string }) {
  const { data, error } = useSWR<string, Error>(address, fetchText, {
    keepPreviousData: true,
    revalidateOnFocus: false,
  });
  if (error && data === undefined) return <p className="problem">{error.message}</p>;
  return (
    <pre className="mail-plain" tabIndex={0}>
      {data ?? '…'}
    </pre>
  );
}
