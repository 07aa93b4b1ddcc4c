#!/bin/sh
# Uploads one session and analyses it: the four calls of the API, with curl and nothing else.
# Prints the analysis as JSON; its figures stand under "result".
#
#   LAB       address of the lab, like http://localhost:5173
#   TOKEN     token of scope "write" (npm run lab -- token create …, or the profile page)
#   ANIMAL    code of the animal
#   SESSION   the session as JSON: startsAt, arena, epochs …
#   POSITION  table of positions, CSV
#   SPIKES    table of sorted spikes, CSV
set -eu

api() {
	curl --silent --show-error --fail-with-body --header "Authorization: Bearer $TOKEN" "$@"
}

# Says what the lab answered, and ends.
refused() {
	printf '%s\n' "$answer" >&2
	exit 1
}

# The value of a text field in one line of JSON.
text_of() {
	sed -n "s/.*\"$1\":\"\([^\"]*\)\".*/\1/p"
}

# 1. The session. With a key, a call that is sent twice is recorded once.
answer=$(
	api --request POST "$LAB/api/v1/animals/$ANIMAL/sessions" \
		--header 'Content-Type: application/json' \
		--header "Idempotency-Key: $(basename "$POSITION")-$$" \
		--data "$SESSION"
) || refused
session=$(printf '%s' "$answer" | text_of id)

# 2. Its files, as they are. What was read is answered; a refusal names row, column and reason.
for kind in position spikes; do
	case $kind in
		position) file=$POSITION ;;
		spikes) file=$SPIKES ;;
	esac
	api --upload-file "$file" "$LAB/api/v1/sessions/$session/files/$kind" \
		--header 'Content-Type: text/csv' \
		--header "Content-Disposition: attachment; filename=\"$(basename "$file")\"" >&2
	echo >&2
done

# 3. The analysis. Parameters may be sent as JSON; without any the defaults of session@1 hold.
answer=$(api --request POST "$LAB/api/v1/sessions/$session/analyses") || refused
analysis=$(printf '%s' "$answer" | text_of id)

# 4. Its result, once a worker has computed it.
while :; do
	answer=$(api "$LAB/api/v1/analyses/$analysis") || refused
	case $(printf '%s' "$answer" | text_of state) in
		done) break ;;
		failed) refused ;;
	esac
	sleep 0.5
done
printf '%s\n' "$answer"
