import type { Extensions } from '@tiptap/core';
import { ReactNodeViewRenderer } from '@tiptap/react';
import { bandNames, bandOf, type Matrix, type Rating } from '#shared/risk/matrix.ts';
import { documentExtensions, Hazard, TitleBlock } from '#shared/statements/document/nodes.ts';
import { PassageIds } from './ids.ts';
import { StatementKeys } from './keys.ts';
import { slashMenu, type SlashSource } from './slash.ts';
import { TitleBlockView } from './TitleBlockView.tsx';

type Options = { matrix: Matrix; slash: SlashSource };

/** The shared schema with the behaviour of the editor. Only the title block, of which there is one, has a React view. */
export function editorExtensions({ matrix, slash }: Options): Extensions {
  const titleBlock = TitleBlock.extend({ addNodeView: () => ReactNodeViewRenderer(TitleBlockView) });
  const hazard = Hazard.extend({
    addAttributes() {
      const own: Record<string, AttributeSpec> = this.parent?.() ?? {};
      return {
        ...own,
        initial: withBand(own.initial, 'before', matrix),
        residual: withBand(own.residual, 'after', matrix),
      };
    },
  });
  return [
    ...documentExtensions.map((extension) => {
      if (extension.name === 'titleBlock') return titleBlock;
      return extension.name === 'hazard' ? hazard : extension;
    }),
    PassageIds,
    StatementKeys,
    slashMenu(slash),
  ];
}

type AttributeSpec = {
  renderHTML?: ((attributes: Record<string, unknown>) => Record<string, unknown> | null) | null;
};

/** Adds the band in words, which the stylesheet sets into the margin. */
function withBand<T extends AttributeSpec | undefined>(spec: T, name: 'before' | 'after', matrix: Matrix) {
  return {
    ...spec,
    renderHTML: (attributes: Record<string, unknown>) => {
      const rating = attributes[name === 'before' ? 'initial' : 'residual'] as Rating | null;
      const band = rating && bandOf(matrix, rating);
      return {
        ...spec?.renderHTML?.(attributes),
        [`data-${name}`]:
          rating && band ? `${bandNames[band]} ${rating.likelihood}${rating.consequence}` : 'not rated',
        [`data-${name}-band`]: band ?? 'none',
      };
    },
  };
}
