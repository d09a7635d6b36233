/**
 * A page for people who want to check an exported log with tools that are not ours: bash, GNU coreutils, grep, sed, awk
 * and openssl 3. Its code blocks run one after the other as they stand; the spec runs them.
 */
export const HOW_TO_CHECK = String.raw`# How to check without us

You have an exported record log, a file of lines. This page checks it with ordinary tools and none of our software.
You need a terminal with bash, sha256sum and openssl 3 or newer. Run the blocks in order, in one terminal, in the folder
of the file. Each prints a line that begins with "good" or "WRONG".

Ask the organisation for its public key by another way than the file: on paper, by telephone, from an older mail.
A key that comes with the file proves nothing.

## 1. What you want to check

Entries are numbered from 0.

~~~bash
FILE=log.jsonl
ENTRY=17
VKEY='the key you were given'
~~~

~~~bash
verdict() { if [ "$2" = "$3" ]; then echo "good: $1"; else echo "WRONG: $1: $2 is not $3"; fi; }
bytes() { tr a-f A-F | basenc --decode --base16; }
sha() { sha256sum | cut -c 1-64; }
node() { { printf '\001'; printf '%s%s' "$1" "$2" | bytes; } | sha; }
grep "^{\"index\":$ENTRY," "$FILE" > entry.txt
~~~

## 2. The record belongs to its entry

The leaf of an entry holds SHA-256 over the salt and then the record. An entry whose record was erased when its time of
keeping ended has no salt and no record; skip this block for it.

~~~bash
sed 's/.*"salt":"\([0-9a-f]*\)".*/\1/' entry.txt | tr -d '\n' | bytes > salt.bin
sed 's/.*"record":"\([^"]*\)".*/\1/' entry.txt | base64 --decode > record.bin
IN_LEAF=$(sed 's/.*recordHash\\":\\"\([0-9a-f]*\).*/\1/' entry.txt)
verdict "record of entry $ENTRY" "$(cat salt.bin record.bin | sha)" "$IN_LEAF"
~~~

The record itself is now in record.bin: open it and read what was signed.

## 3. The leaf belongs to its hash

The hash of a leaf is SHA-256 over one zero byte and then the text of the leaf.

~~~bash
sed 's/.*"leaf":"\(.*\)","leafHash".*/\1/; s/\\"/"/g' entry.txt | tr -d '\n' > leaf.txt
LEAF_HASH=$(sed 's/.*"leafHash":"\([0-9a-f]*\)".*/\1/' entry.txt)
verdict "leaf of entry $ENTRY" "$({ printf '\000'; cat leaf.txt; } | sha)" "$LEAF_HASH"
~~~

## 4. The checkpoint is signed

The last line of the file holds the checkpoint: the name of the log, how many entries it has, their root, and a
signature. Keep checkpoint.txt: every later log must still fit it.

~~~bash
NOTE=$(tail -n 1 "$FILE" | sed 's/^{"entries":[0-9]*,"checkpoint":"\([^"]*\)".*/\1/')
printf '%b' "$NOTE" > checkpoint.txt
head -n 3 checkpoint.txt > signed.txt
tail -n 1 checkpoint.txt | awk '{ print $3 }' | base64 --decode > keyid-and-signature.bin
tail -c 64 keyid-and-signature.bin > signature.bin
printf '%s' "$VKEY" | cut -d + -f 3- | base64 --decode | tail -c 32 > key.bin
{ printf '\060\052\060\005\006\003\053\145\160\003\041\000'; cat key.bin; } > key.der
verdict "name of the log" "$(head -n 1 signed.txt)" "$(printf '%s' "$VKEY" | cut -d + -f 1)"
SIGNATURE=$(openssl pkeyutl -verify -pubin -inkey key.der -keyform DER -rawin -in signed.txt -sigfile signature.bin 2>&1)
verdict "signature" "$SIGNATURE" "Signature Verified Successfully"
SIZE=$(sed -n 2p signed.txt)
ROOT=$(sed -n 3p signed.txt | base64 --decode | od -A n -t x1 | tr -d ' \n')
~~~

## 5. The entry is under the checkpoint

**An extract** brings the way from the entry to the root: at each step SHA-256 over one byte 1 and the two hashes.

~~~bash
if grep -q '"proof":' entry.txt; then
  HASH=$LEAF_HASH; AT=$ENTRY; LAST=$((SIZE - 1))
  for OTHER in $(sed 's/.*"proof":\[\(.*\)\].*/\1/; s/[",]/ /g' entry.txt); do
    if [ $((AT % 2)) = 1 ] || [ $AT = $LAST ]; then
      HASH=$(node $OTHER $HASH)
      while [ $((AT % 2)) = 0 ] && [ $AT != 0 ]; do AT=$((AT / 2)); LAST=$((LAST / 2)); done
    else
      HASH=$(node $HASH $OTHER)
    fi
    AT=$((AT / 2)); LAST=$((LAST / 2))
  done
  verdict "way from entry $ENTRY to the root" "$HASH at $LAST" "$ROOT at 0"
fi
~~~

**A whole log** has all leaf hashes: join them two by two, an odd one out moves up as it is, until one is left. Before
that, each leaf hash must belong to its leaf, as in block 3. This is slow with many entries: some minutes for 10,000.

~~~bash
if grep -q '^{"format":"kneeboard-log/1","form":"whole"' "$FILE"; then
  grep '^{"index":' "$FILE" | sed 's/.*"leaf":"\(.*\)","leafHash".*/\1/; s/\\"/"/g' |
    while IFS= read -r LEAF; do { printf '\000'; printf '%s' "$LEAF"; } | sha; done > level.txt
  verdict "number of entries" "$(wc -l < level.txt)" "$SIZE"
  while [ "$(wc -l < level.txt)" -gt 1 ]; do
    while read -r LEFT; do
      if read -r RIGHT; then node $LEFT $RIGHT; else echo $LEFT; fi
    done < level.txt > next.txt
    mv next.txt level.txt
  done
  verdict "root of all entries" "$(cat level.txt)" "$ROOT"
fi
~~~

## 6. Against a checkpoint you kept

If you kept a checkpoint from an earlier day, run block 5 for a whole log on the first so many entries as it names: the
root must be the one on its third line. A log that no longer gives the old root has been rewritten.
`;
