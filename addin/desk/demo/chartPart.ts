import { element, escapeXml, textElement, xmlPart } from './xml';

export interface ChartSpec {
  /** Columns, or markers without a line between them. */
  kind: 'bar' | 'marker';
  title: string;
  valueTitle: string;
  color: string;
  series: { name: string; nameText: string; labels: string; labelTexts: readonly string[]; values: string; valueNumbers: readonly number[] };
}

/** The part of a chart with one series, its labels and values cached as the worksheet caches them. */
export function chartPart(spec: ChartSpec): string {
  const { series } = spec;
  const fill = element('a:solidFill', {}, element('a:srgbClr', { val: spec.color }));
  const look = element('c:spPr', {}, spec.kind === 'bar' ? fill : element('a:ln', { w: 22225 }, element('a:noFill')));
  const data = [
    element('c:idx', { val: 0 }), element('c:order', { val: 0 }),
    element('c:tx', {}, element('c:strRef', {}, textElement('c:f', series.name) + cache('c:strCache', [series.nameText]))),
    look,
    spec.kind === 'bar' ? element('c:invertIfNegative', { val: 0 }) : marker(spec.color),
    element('c:cat', {}, element('c:strRef', {}, textElement('c:f', series.labels) + cache('c:strCache', series.labelTexts))),
    element('c:val', {}, element('c:numRef', {}, textElement('c:f', series.values)
      + cache('c:numCache', series.valueNumbers, element('c:formatCode', {}, '0.0')))),
    spec.kind === 'marker' ? element('c:smooth', { val: 0 }) : '',
  ].join('');
  const axes = element('c:axId', { val: 1001 }) + element('c:axId', { val: 1002 });
  const plot = spec.kind === 'bar'
    ? element('c:barChart', {}, element('c:barDir', { val: 'col' }) + element('c:grouping', { val: 'clustered' }) + element('c:varyColors', { val: 0 })
      + element('c:ser', {}, data) + element('c:gapWidth', { val: 40 }) + axes)
    : element('c:lineChart', {}, element('c:grouping', { val: 'standard' }) + element('c:varyColors', { val: 0 })
      + element('c:ser', {}, data) + element('c:marker', { val: 1 }) + axes);
  return xmlPart(element('c:chartSpace', {
    'xmlns:c': 'http://schemas.openxmlformats.org/drawingml/2006/chart',
    'xmlns:a': 'http://schemas.openxmlformats.org/drawingml/2006/main',
    'xmlns:r': 'http://schemas.openxmlformats.org/officeDocument/2006/relationships',
  }, element('c:roundedCorners', { val: 0 }) + element('c:chart', {}, [
    title(spec.title, 1400),
    element('c:autoTitleDeleted', { val: 0 }),
    element('c:plotArea', {}, element('c:layout') + plot + categoryAxis() + valueAxis(spec.valueTitle)),
    element('c:plotVisOnly', { val: 1 }),
    element('c:dispBlanksAs', { val: 'gap' }),
  ].join(''))));
}

function cache(name: string, points: readonly (string | number)[], format = ''): string {
  return element(name, {}, format + element('c:ptCount', { val: points.length })
    + points.map((point, idx) => element('c:pt', { idx }, element('c:v', {}, escapeXml(String(point))))).join(''));
}

function marker(color: string): string {
  return element('c:marker', {}, element('c:symbol', { val: 'circle' }) + element('c:size', { val: 5 })
    + element('c:spPr', {}, element('a:solidFill', {}, element('a:srgbClr', { val: color }))));
}

function title(text: string, size: number, turned = false): string {
  const run = element('a:r', {}, element('a:rPr', { lang: 'en-GB', sz: size, b: 0 }) + textElement('a:t', text));
  return element('c:title', {}, element('c:tx', {}, element('c:rich', {},
    element('a:bodyPr', turned ? { rot: -5400000, vert: 'horz' } : {}) + element('a:lstStyle')
    + element('a:p', {}, element('a:pPr', {}, element('a:defRPr', { sz: size, b: 0 })) + run))) + element('c:overlay', { val: 0 }));
}

function smallText(rotation?: number): string {
  return element('c:txPr', {}, element('a:bodyPr', rotation === undefined ? {} : { rot: rotation, vert: 'horz' }) + element('a:lstStyle')
    + element('a:p', {}, element('a:pPr', {}, element('a:defRPr', { sz: 800 })) + element('a:endParaRPr', { lang: 'en-GB' })));
}

function categoryAxis(): string {
  return element('c:catAx', {}, [
    element('c:axId', { val: 1001 }), element('c:scaling', {}, element('c:orientation', { val: 'minMax' })), element('c:delete', { val: 0 }),
    element('c:axPos', { val: 'b' }), element('c:numFmt', { formatCode: 'General', sourceLinked: 0 }), element('c:majorTickMark', { val: 'out' }),
    element('c:minorTickMark', { val: 'none' }), element('c:tickLblPos', { val: 'nextTo' }), smallText(-5400000),
    element('c:crossAx', { val: 1002 }), element('c:crosses', { val: 'autoZero' }), element('c:auto', { val: 1 }), element('c:lblAlgn', { val: 'ctr' }),
    element('c:lblOffset', { val: 100 }), element('c:tickLblSkip', { val: 4 }), element('c:noMultiLvlLbl', { val: 0 }),
  ].join(''));
}

function valueAxis(text: string): string {
  const grid = element('c:majorGridlines', {}, element('c:spPr', {}, element('a:ln', { w: 6350 },
    element('a:solidFill', {}, element('a:srgbClr', { val: 'D9E0E3' })))));
  return element('c:valAx', {}, [
    element('c:axId', { val: 1002 }), element('c:scaling', {}, element('c:orientation', { val: 'minMax' }) + element('c:min', { val: 0 })),
    element('c:delete', { val: 0 }), element('c:axPos', { val: 'l' }), grid, title(text, 900, true),
    element('c:numFmt', { formatCode: '0', sourceLinked: 0 }), element('c:majorTickMark', { val: 'out' }), element('c:minorTickMark', { val: 'none' }),
    element('c:tickLblPos', { val: 'nextTo' }), smallText(), element('c:crossAx', { val: 1001 }), element('c:crosses', { val: 'autoZero' }),
    element('c:crossBetween', { val: 'between' }),
  ].join(''));
}

/** The drawing part that places charts; corners are zero-based columns and rows. */
export function drawingPart(frames: readonly { relation: string; name: string; from: readonly [number, number]; to: readonly [number, number] }[]): string {
  const corner = (name: string, [column, row]: readonly [number, number]): string => element(`xdr:${name}`, {},
    element('xdr:col', {}, String(column)) + element('xdr:colOff', {}, '0') + element('xdr:row', {}, String(row)) + element('xdr:rowOff', {}, '0'));
  return xmlPart(element('xdr:wsDr', {
    'xmlns:xdr': 'http://schemas.openxmlformats.org/drawingml/2006/spreadsheetDrawing',
    'xmlns:a': 'http://schemas.openxmlformats.org/drawingml/2006/main',
  }, frames.map((frame, i) => element('xdr:twoCellAnchor', {}, [
    corner('from', frame.from),
    corner('to', frame.to),
    element('xdr:graphicFrame', { macro: '' }, [
      element('xdr:nvGraphicFramePr', {}, element('xdr:cNvPr', { id: i + 2, name: `Chart ${i + 1}`, descr: frame.name }) + element('xdr:cNvGraphicFramePr')),
      element('xdr:xfrm', {}, element('a:off', { x: 0, y: 0 }) + element('a:ext', { cx: 0, cy: 0 })),
      element('a:graphic', {}, element('a:graphicData', { uri: 'http://schemas.openxmlformats.org/drawingml/2006/chart' }, element('c:chart', {
        'xmlns:c': 'http://schemas.openxmlformats.org/drawingml/2006/chart',
        'xmlns:r': 'http://schemas.openxmlformats.org/officeDocument/2006/relationships',
        'r:id': frame.relation,
      }))),
    ].join('')),
    element('xdr:clientData'),
  ].join(''))).join('')));
}
