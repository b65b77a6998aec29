/** One field at fault: `field` is its path in the body, such as `left.points.upperBall`. */
export interface FieldError {
	field: string;
	message: string;
}

/** The body of every API error (RFC 9457, application/problem+json). */
export interface Problem {
	type: 'about:blank';
	title: string;
	status: number;
	detail: string;
	/** The id under which the log holds the details. */
	id?: string;
	/** At 422: what is wrong, field by field. */
	errors?: FieldError[];
	/** At 409: what is stored now, for the person to choose from. */
	current?: unknown;
	/** At 429: seconds to wait. */
	retryAfter?: number;
}
