'use client';

import { useState } from 'react';
import { SHOWN_CAUTION } from '../caution';
import type { ShownScene } from '../stage/shown-scene';
import { PictureEngine } from '../stage/picture-engine';
import { Show } from '../present/show';

/** A demonstration in the hands of somebody with a link: the engine is in the page, nothing is sent back. */
export function SharedShow({ title, scenes }: { title: string; scenes: readonly ShownScene[] }) {
  const [index, setIndex] = useState(0);
  return (
    <PictureEngine>
      <main>
        {scenes.length === 0 ? (
          <div className="px-6 py-10">
            <h1 className="text-2xl">{title}</h1>
            <p className="mt-2 text-ink-soft">This demonstration has no scenes yet. Ask whoever sent the link.</p>
          </div>
        ) : (
          <Show title={title} scenes={scenes} index={index} onGo={setIndex} />
        )}
        <p className="px-4 pb-6 text-sm text-ink-soft sm:px-8">
          {SHOWN_CAUTION}
        </p>
      </main>
    </PictureEngine>
  );
}
