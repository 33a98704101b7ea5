import { isMain } from './namespaces';
import { scanXml } from './scanXml';
import { decodeXstring } from './xstring';

/** The shared strings in order: runs of rich text joined, phonetic runs left out. */
export function readSharedStrings(text: string, part: string): string[] {
  const strings: string[] = [];
  let current = '';
  let inText = false;
  let phonetic = 0;
  scanXml(text, part, {
    open(tag) {
      if (!isMain(tag.uri)) return;
      if (tag.local === 'si') current = '';
      else if (tag.local === 'rPh') phonetic++;
      else if (tag.local === 't') inText = phonetic === 0;
    },
    close(tag) {
      if (!isMain(tag.uri)) return;
      if (tag.local === 't') inText = false;
      else if (tag.local === 'rPh') phonetic--;
      else if (tag.local === 'si') strings.push(decodeXstring(current));
    },
    text(data) {
      if (inText) current += data;
    },
  });
  return strings;
}
