/** Fills an English template in, or its translation. */
export type Translate = (template: string, ...values: (string | number)[]) => string;

/** The English itself: for tests. */
export const english: Translate = (template, ...values) =>
  template.replace(/\{(\d+)\}/g, (_, i) => String(values[Number(i)]));
