/** Expressions as TeX, as text of the language and as JSON. */
export { nameStyle, texOfName, type NameStyle } from './nameStyle.ts';
export { relationToTex, toTex } from './tex.ts';
export { relationToText, toText } from './text.ts';
export { fromJson, toJson, type ExpressionJson } from './json.ts';
