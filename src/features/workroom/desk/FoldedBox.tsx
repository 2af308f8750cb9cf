import { useEffect, useRef, useState } from 'react';
import { foldedViewHtml } from '@/components/folded/markup';
import { showFolded } from '@/components/folded/show';
import '@/components/folded/folded.css';
import type { LiveFigures } from '@/writeup/live';

/** The whole box, which can be turned and folded; its figures follow, the way it is turned and folded stays. */
export function FoldedBox({ model, figures }: LiveFigures) {
  const place = useRef<HTMLDivElement>(null);
  // Written once: from then on the element draws itself.
  const [html] = useState(() => foldedViewHtml({ model, figures, width: 260, height: 220, id: 'whole-box-folded' }));
  useEffect(() => void import('@/components/folded/folded-view.client'), []);
  useEffect(() => {
    if (place.current) showFolded(place.current, model, figures);
  }, [model, figures]);
  return <div ref={place} dangerouslySetInnerHTML={{ __html: html }} />;
}
