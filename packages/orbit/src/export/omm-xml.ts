/** Writes mean elements as a CCSDS OMM in XML (502.0-B, schema NDM/XML of 505.0-B). */
import type { ElementSet } from '../elements/element-set.js';
import { escapeXml } from '../ephemeris/xml-tree.js';

/** What the message carries of an element set. */
export type OmmFields = Omit<ElementSet, 'format' | 'epochMs' | 'tle' | 'sourceLine'>;

/** The message, every number with the shortest digits that read back as the same one. */
export function toOmmXml(set: OmmFields, head: { creationUtc: string; originator: string }): string {
  return `${[
    '<?xml version="1.0" encoding="UTF-8"?>',
    '<omm id="CCSDS_OMM_VERS" version="2.0">',
    '<header>',
    element('CREATION_DATE', head.creationUtc),
    element('ORIGINATOR', head.originator),
    '</header>',
    '<body>',
    '<segment>',
    '<metadata>',
    element('OBJECT_NAME', set.objectName),
    element('OBJECT_ID', set.objectId),
    element('CENTER_NAME', 'EARTH'),
    element('REF_FRAME', 'TEME'),
    element('TIME_SYSTEM', 'UTC'),
    element('MEAN_ELEMENT_THEORY', 'SGP4'),
    '</metadata>',
    '<data>',
    ...meanElements(set),
    ...tleParameters(set),
    '</data>',
    '</segment>',
    '</body>',
    '</omm>',
  ].join('\n')}\n`;
}

function meanElements(set: OmmFields): string[] {
  return [
    '<meanElements>',
    element('EPOCH', set.epochUtc.replace(/Z$/, '')),
    element('MEAN_MOTION', set.meanMotionRevPerDay),
    element('ECCENTRICITY', set.eccentricity),
    element('INCLINATION', set.inclinationDeg),
    element('RA_OF_ASC_NODE', set.raanDeg),
    element('ARG_OF_PERICENTER', set.argPerigeeDeg),
    element('MEAN_ANOMALY', set.meanAnomalyDeg),
    '</meanElements>',
  ];
}

function tleParameters(set: OmmFields): string[] {
  return [
    '<tleParameters>',
    element('EPHEMERIS_TYPE', 0),
    element('CLASSIFICATION_TYPE', set.classification),
    element('NORAD_CAT_ID', set.catalogNumber),
    element('ELEMENT_SET_NO', set.elementSetNumber),
    element('REV_AT_EPOCH', set.revolutionAtEpoch),
    element('BSTAR', set.bstarPerEarthRadius),
    element('MEAN_MOTION_DOT', set.meanMotionDot),
    element('MEAN_MOTION_DDOT', set.meanMotionDdot),
    '</tleParameters>',
  ];
}

function element(name: string, value: string | number): string {
  return `<${name}>${escapeXml(String(value))}</${name}>`;
}
