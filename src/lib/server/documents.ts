import { z } from 'zod';
import { AxleDocumentError, axleGeometry, canonicalAxle, upgradeAxle } from '../domain/axle';
import { KinematicsError, solveCorner } from '../kinematics';
import type { CornerGeometry, CornerState } from '../kinematics';
import { axleSchema } from '../schemas/axle';
import type { AxleDocument } from '../schemas/axle';
import type { FieldError } from '../schemas/problem';
import { refuse, refuseFields } from './problem';

const AXLE_SCHEMA = axleSchema.shape.schema.value;

/** Body of `PUT …/draft`; the document inside is read by `receiveDocument`. */
export const draftBodySchema = z.object({ document: z.unknown() });

/** A document as sent: 422 names each field at fault, or says that it is of a newer schema. */
export function receiveDocument(sent: unknown): AxleDocument {
	const newer = z.object({ schema: z.number().gt(AXLE_SCHEMA) }).safeParse(sent);
	if (newer.success) {
		const message = `This document has schema ${newer.data.schema}; this server reads up to ${AXLE_SCHEMA}.`;
		refuseFields([{ field: 'document.schema', message }]);
	}
	const read = axleSchema.safeParse(sent);
	if (read.success) return read.data;
	refuseFields(read.error.issues.map(({ path, message }) => ({ field: ['document', ...path].join('.'), message })));
}

/** The bytes of a document that are stored and hashed. */
export function canonical(document: AxleDocument): string {
	return canonicalAxle(document);
}

/** A stored document, upgraded to the current schema; the stored bytes stay as they are. One of a newer schema is refused in words. */
export function readDocument(stored: string): AxleDocument {
	try {
		return upgradeAxle(JSON.parse(stored));
	} catch (failure) {
		if (failure instanceof AxleDocumentError) refuse(500, failure.message);
		throw failure;
	}
}

/** Both corners of a document in its own state at ride height. */
export interface SolvedAxle {
	left: CornerState;
	right: CornerState;
}

/** Solves a document at ride height, or refuses with 422 naming each missing field, or the point that makes it unsolvable. */
export function solveDocument(document: AxleDocument): SolvedAxle {
	const read = axleGeometry(document);
	if ('missing' in read) {
		refuseFields(
			read.missing.map(({ path, label }) => ({
				field: /^(left|right)\./.test(path) ? path : `left.${path}`,
				message: `${label}: not entered yet.`
			})),
			'The geometry is not complete yet.'
		);
	}
	const right = 'left' in read.axle ? read.axle.right : null;
	const left = solveSide('left', read.left);
	return { left, right: right ? solveSide('right', right) : left };
}

function solveSide(side: 'left' | 'right', geometry: CornerGeometry): CornerState {
	try {
		return solveCorner(geometry, { travel: 0, rack: 0 });
	} catch (failure) {
		if (!(failure instanceof KinematicsError)) throw failure;
		const error: FieldError = { field: `${side}.points.${failure.at ?? ''}`, message: failure.message };
		refuseFields([error], `The ${side} side cannot be solved: ${failure.message}`);
	}
}
