/** What a call of the API is answered from. No cookies and no signed-in person: only the token counts. */
export interface ApiEvent {
	request: Request;
	url: URL;
	params: Partial<Record<string, string>>;
}
