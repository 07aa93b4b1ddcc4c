declare module 's3rver' {
	/** The part of the fake S3 server that tests use; the package ships no types. */
	export default class S3rver {
		constructor(options: {
			address: string;
			port: number;
			silent: boolean;
			directory: string;
			configureBuckets: { name: string }[];
		});
		run(): Promise<{ address: string; port: number }>;
		close(): Promise<void>;
	}
}
