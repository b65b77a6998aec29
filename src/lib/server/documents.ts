import { z } from 'zod';
import { axleGeometry, canonicalAxle, upgradeAxle } from '../domain/axle';
import { KinematicsError, solveCorner } from '../kinematics';
import type { CornerGeometry, CornerState } from '../kinematics';
import { axleSchema } from '../schemas/axle';
import type { AxleDocument } from '../schemas/axle';
import type { FieldError } from '../schemas/problem';
import { refuseFields } from './problem';

/** Body of `PUT …/draft`. */
export const draftBodySchema = z.object({ document: axleSchema });

/** The bytes of a document that are stored and hashed. */
export function canonical(document: AxleDocument): string {
	return canonicalAxle(document);
}

/** A stored document, upgraded to the current schema; the stored bytes stay as they are. */
export function readDocument(stored: string): AxleDocument {
	return upgradeAxle(JSON.parse(stored));
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
