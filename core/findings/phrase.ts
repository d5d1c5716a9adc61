/** An English template and what is filled in, as shown: `{name}` stands for the value of that name. */
export interface Phrase {
  template: string;
  values: Readonly<Record<string, string>>;
}

/** The template with its values filled in; a name without a value stays as it is. */
export function fill(template: string, values: Readonly<Record<string, string>>): string {
  return template.replace(/\{(\w+)\}/g, (all, name: string) => values[name] ?? all);
}
