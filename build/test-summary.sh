#!/usr/bin/env bash
# build/test-summary.sh DIR: adds up the counters of every TRX below DIR, names skipped tests, ends with the line CI reads.
passed=0; failed=0; skipped=0; files=0
while IFS= read -r -d '' trx; do
  files=$((files + 1))
  counters=$(grep -o '<Counters [^>]*>' "$trx" | tail -1)
  count() { sed -n "s/.* $1=\"\([0-9]*\)\".*/\1/p" <<<"$counters"; }
  passed=$((passed + $(count passed)))
  failed=$((failed + $(count failed) + $(count error) + $(count timeout) + $(count aborted)))
  skipped=$((skipped + $(count total) - $(count executed)))
  grep -o '<UnitTestResult [^>]*outcome="NotExecuted"[^>]*>' "$trx" | sed 's/.*testName="\([^"]*\)".*/skipped: \1/'
  grep -o '<UnitTestResult [^>]*outcome="Failed"[^>]*>' "$trx" | sed 's/.*testName="\([^"]*\)".*/failed: \1/'
done < <(find "$1" -name '*.trx' -print0)
[ "$files" -gt 0 ] || { echo "no test result found"; exit 1; }
if [ "$skipped" -gt 0 ]; then echo "$passed passed, $failed failed, $skipped skipped"; else echo "$passed passed, $failed failed"; fi
