import { describe, expect, it } from 'vitest';
import { readXmlTree, type XmlElement } from '../ephemeris/xml-tree.js';
import { type OmmFields, toOmmXml } from './omm-xml.js';

const set: OmmFields = {
  objectName: 'LANTERN <9> & "SONS"',
  objectId: '2026-909A',
  catalogNumber: 270_000_001,
  epochUtc: '2026-11-30T06:00:00.000001Z',
  meanMotionRevPerDay: 15.15323725,
  eccentricity: 1e-7,
  inclinationDeg: 97.48,
  raanDeg: 12,
  argPerigeeDeg: 80,
  meanAnomalyDeg: 10,
  bstarPerEarthRadius: 4.0e-5,
  meanMotionDot: -0.00000113,
  meanMotionDdot: 0,
  elementSetNumber: 999,
  revolutionAtEpoch: 100,
  classification: 'U',
};

function find(element: XmlElement, name: string): XmlElement | undefined {
  if (element.name === name) return element;
  for (const child of element.children) {
    const found = find(child, name);
    if (found) return found;
  }
  return undefined;
}

describe('an OMM in XML', () => {
  const reading = readXmlTree(toOmmXml(set, { creationUtc: '2026-12-01T00:00:00', originator: 'HARBOUR' }));
  const root = 'root' in reading ? reading.root : undefined;
  const text = (name: string) => find(root!, name)?.text;

  it('is well-formed and gives every number back', () => {
    expect(root?.attributes.get('version')).toBe('2.0');
    expect(text('OBJECT_NAME')).toBe(set.objectName);
    expect(text('EPOCH')).toBe('2026-11-30T06:00:00.000001');
    expect(Number(text('NORAD_CAT_ID'))).toBe(set.catalogNumber);
    expect(Number(text('ECCENTRICITY'))).toBe(set.eccentricity);
    expect(Number(text('MEAN_MOTION'))).toBe(set.meanMotionRevPerDay);
    expect(Number(text('MEAN_MOTION_DOT'))).toBe(set.meanMotionDot);
    expect(Number(text('BSTAR'))).toBe(set.bstarPerEarthRadius);
  });

  it('keeps the order of the schema', () => {
    // NDM/XML 2.0.0: metadata order; EPHEMERIS_TYPE to MEAN_MOTION_DDOT.
    expect(find(root!, 'metadata')?.children.map(({ name }) => name)).toEqual([
      'OBJECT_NAME',
      'OBJECT_ID',
      'CENTER_NAME',
      'REF_FRAME',
      'TIME_SYSTEM',
      'MEAN_ELEMENT_THEORY',
    ]);
    expect(find(root!, 'tleParameters')?.children.map(({ name }) => name)).toEqual([
      'EPHEMERIS_TYPE',
      'CLASSIFICATION_TYPE',
      'NORAD_CAT_ID',
      'ELEMENT_SET_NO',
      'REV_AT_EPOCH',
      'BSTAR',
      'MEAN_MOTION_DOT',
      'MEAN_MOTION_DDOT',
    ]);
  });
});
