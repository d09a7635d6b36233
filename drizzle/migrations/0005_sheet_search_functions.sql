DO $$
DECLARE t text;
BEGIN
  FOREACH t IN ARRAY ARRAY['sheet_search', 'sheet_words'] LOOP
    EXECUTE format('ALTER TABLE public.%I ENABLE ROW LEVEL SECURITY', t);
    EXECUTE format('ALTER TABLE public.%I FORCE ROW LEVEL SECURITY', t);
    EXECUTE format($p$CREATE POLICY own_organisation ON public.%I USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid) WITH CHECK (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid)$p$, t);
    -- Operators of text search are not leakproof: under the policy above no index would serve them. Nobody signs in as this
    -- role; its one function asks for the organisation in scope itself.
    EXECUTE format('CREATE POLICY search_reads ON public.%I FOR SELECT TO kneeboard_search USING (true)', t);
    -- The owner is a member of that role and would see what it sees.
    EXECUTE format($p$CREATE POLICY owner_as_all ON public.%I AS RESTRICTIVE TO CURRENT_USER USING (organisation_id = nullif(current_setting('app.organisation', true), '')::uuid)$p$, t);
  END LOOP;
END $$;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON sheet_search TO kneeboard_app;
--> statement-breakpoint
GRANT SELECT, INSERT ON sheet_words TO kneeboard_app;
--> statement-breakpoint
GRANT SELECT (organisation_id, revision_id, product_id, state, language, signal_word, standing, uploaded_at, name, keys, document) ON sheet_search TO kneeboard_search;
--> statement-breakpoint
GRANT SELECT ON sheet_words TO kneeboard_search;
--> statement-breakpoint
GRANT USAGE ON SCHEMA public TO kneeboard_search;
--> statement-breakpoint
GRANT EXECUTE ON FUNCTION scope() TO kneeboard_search;
--> statement-breakpoint
-- Accents off, ligatures and wide forms as plain letters. These small ones set no search_path, so that they are planned as
-- part of the query that uses them and not again at each call.
CREATE FUNCTION search_plain(said text) RETURNS text LANGUAGE sql IMMUTABLE PARALLEL SAFE AS $$
  SELECT regexp_replace(normalize(translate(said, '™℠®©', '    '), NFKD), '[\u0300-\u036f]', '', 'g')
$$;
--> statement-breakpoint
CREATE FUNCTION search_fold(said text) RETURNS text LANGUAGE sql IMMUTABLE PARALLEL SAFE AS $$
  SELECT btrim(regexp_replace(lower(search_plain(said)), '[^[:alnum:]]+', ' ', 'g'))
$$;
--> statement-breakpoint
CREATE FUNCTION search_words(said text) RETURNS text[] LANGUAGE sql IMMUTABLE PARALLEL SAFE AS $$
  SELECT array_remove(regexp_split_to_array(search_fold(said), ' '), '')
$$;
--> statement-breakpoint
CREATE FUNCTION search_config(language text) RETURNS regconfig LANGUAGE sql IMMUTABLE PARALLEL SAFE AS $$
  SELECT CASE language WHEN 'en' THEN 'english'::regconfig WHEN 'es' THEN 'spanish'::regconfig WHEN 'fr' THEN 'french'::regconfig WHEN 'de' THEN 'german'::regconfig ELSE 'simple'::regconfig END
$$;
--> statement-breakpoint
-- One key as a tsquery; longer words than this are no words.
CREATE FUNCTION search_key(kind text, word text, is_open boolean) RETURNS text LANGUAGE sql IMMUTABLE PARALLEL SAFE AS $$
  SELECT quote_literal(kind || ' ' || left(word, 60)) || CASE WHEN is_open THEN ':*' ELSE '' END
$$;
--> statement-breakpoint
-- English needs no second pass; elsewhere a word typed without its accents is found too.
CREATE FUNCTION search_document(language text, said text) RETURNS tsvector LANGUAGE sql IMMUTABLE PARALLEL SAFE AS $$
  SELECT array_to_tsvector(ARRAY['lang ' || CASE WHEN language IN ('en', 'es', 'fr', 'de') THEN language ELSE 'other' END]) || to_tsvector(search_config(language), said)
    || CASE WHEN language = 'en' THEN ''::tsvector ELSE to_tsvector(search_config(language), search_plain(said)) END
$$;
--> statement-breakpoint
-- What was typed as a query over the documents of each language. Null when nothing is left to look for: only small words,
-- or only words to leave out.
CREATE FUNCTION search_query(languages text[], wanted text) RETURNS tsquery LANGUAGE plpgsql IMMUTABLE SET search_path = public, pg_temp AS $$
DECLARE
  one text;
  asked tsquery;
  whole tsquery;
  plain text := search_plain(wanted);
BEGIN
  FOREACH one IN ARRAY languages LOOP
    asked := websearch_to_tsquery(search_config(one), wanted);
    IF one <> 'en' AND plain <> wanted THEN asked := asked || websearch_to_tsquery(search_config(one), plain); END IF;
    CONTINUE WHEN querytree(asked) IN ('', 'T');
    asked := asked && quote_literal('lang ' || one)::tsquery;
    whole := CASE WHEN whole IS NULL THEN asked ELSE whole || asked END;
  END LOOP;
  RETURN whole;
END $$;
--> statement-breakpoint
-- Writes one revision's row of sheet_search. The text is kept when none is given.
CREATE FUNCTION index_sheet(revision uuid, read_text text DEFAULT NULL) RETURNS void LANGUAGE plpgsql SET search_path = public, pg_temp SET client_min_messages = warning AS $$
DECLARE
  r record;
  name_words text[];
  supplier_words text[];
  said text;
  body text;
  words_of_sheet tsvector;
BEGIN
  SELECT v.*, p.name AS product_name, p.supplier AS product_supplier, v.fields -> 'productName' ->> 'value' AS read_name, v.fields -> 'supplier' ->> 'value' AS read_supplier,
      coalesce(v.language, v.fields -> 'language' ->> 'value') AS in_language, coalesce(read_text, s.full_text) AS body_text, s.document, s.field_text, s.language AS indexed_language
    INTO r
    FROM revisions v
    LEFT JOIN products p ON p.organisation_id = v.organisation_id AND p.id = v.product_id
    LEFT JOIN sheet_search s ON s.organisation_id = v.organisation_id AND s.revision_id = v.id
    WHERE v.organisation_id = scope() AND v.id = revision;
  IF NOT FOUND THEN RETURN; END IF;
  name_words := search_words(concat_ws(' ', r.product_name, r.read_name));
  supplier_words := search_words(concat_ws(' ', r.product_supplier, r.read_supplier));
  said := concat_ws(E'\n', regexp_replace(r.file_name, '[^[:alnum:]]+', ' ', 'g'),
    (SELECT string_agg(concat_ws(' ', e -> 'value' ->> 'name', e -> 'value' ->> 'cas'), E'\n') FROM jsonb_array_elements(r.fields -> 'ingredients') e),
    (SELECT string_agg(concat_ws(' ', e -> 'value' ->> 'substance', e -> 'value' ->> 'kind'), E'\n') FROM jsonb_array_elements(r.fields -> 'limits') e),
    (SELECT string_agg(e -> 'value' ->> 'text', E'\n') FROM jsonb_array_elements(r.fields -> 'protectionWords') e));
  IF read_text IS NULL AND r.field_text = said AND r.indexed_language IS NOT DISTINCT FROM r.in_language THEN
    words_of_sheet := r.document;
  ELSE
    body := concat_ws(E'\n', said, r.body_text);
    BEGIN
      words_of_sheet := search_document(r.in_language, body);
    EXCEPTION WHEN program_limit_exceeded THEN
      -- More different words than one row can hold: no sheet, but no reason to fail either.
      words_of_sheet := search_document(r.in_language, left(body, 50000));
    END;
  END IF;
  INSERT INTO sheet_search AS s (organisation_id, revision_id, product_id, state, language, signal_word, standing, uploaded_at, name, supplier, keys, document, field_text, full_text)
    VALUES (r.organisation_id, r.id, r.product_id, r.state, r.in_language, r.fields -> 'signalWord' ->> 'value',
      CASE WHEN r.is_current THEN 0 WHEN r.state = 'confirmed' THEN 1 WHEN r.state = 'set-aside' THEN 3 ELSE 2 END, r.uploaded_at,
      left(search_fold(coalesce(r.product_name, r.read_name, '')), 200), left(search_fold(coalesce(r.product_supplier, r.read_supplier, '')), 200),
      array_to_tsvector(ARRAY(
        SELECT 'n ' || left(word, 60) FROM unnest(name_words) word
        UNION SELECT 's ' || left(word, 60) FROM unnest(supplier_words) word
        UNION SELECT 'c ' || digits FROM jsonb_array_elements(r.fields -> 'ingredients') e, ltrim(regexp_replace(e -> 'value' ->> 'cas', '\D', '', 'g'), '0') digits WHERE digits <> ''
        UNION SELECT 'k ' || lower(code) FROM jsonb_array_elements(r.fields -> 'hazardCodes') e, regexp_split_to_table(e ->> 'value', '\+') code
        UNION SELECT 'k ' || lower(code) FROM jsonb_array_elements(r.fields -> 'precautionaryCodes') e, regexp_split_to_table(e ->> 'value', '\+') code)),
      words_of_sheet, said, r.body_text)
    ON CONFLICT (organisation_id, revision_id) DO UPDATE SET product_id = excluded.product_id, state = excluded.state, language = excluded.language, signal_word = excluded.signal_word,
      standing = excluded.standing, name = excluded.name, supplier = excluded.supplier, keys = excluded.keys, document = excluded.document, field_text = excluded.field_text, full_text = excluded.full_text;
  -- In one order, so that two who add the same words wait for each other and never both.
  INSERT INTO sheet_words (organisation_id, word)
    SELECT DISTINCT r.organisation_id, own.word FROM unnest(name_words || supplier_words) AS own(word)
      WHERE length(own.word) BETWEEN 3 AND 60 AND NOT EXISTS (SELECT 1 FROM sheet_words k WHERE k.organisation_id = r.organisation_id AND k.word = own.word)
      ORDER BY own.word
    ON CONFLICT DO NOTHING;
END $$;
--> statement-breakpoint
CREATE FUNCTION index_changed_sheet() RETURNS trigger LANGUAGE plpgsql SET search_path = public, pg_temp AS $$
BEGIN
  PERFORM index_sheet(NEW.id);
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE TRIGGER index_sheet AFTER INSERT OR UPDATE OF state, fields, product_id, language, is_current ON revisions FOR EACH ROW EXECUTE FUNCTION index_changed_sheet();
--> statement-breakpoint
CREATE FUNCTION index_renamed_product() RETURNS trigger LANGUAGE plpgsql SET search_path = public, pg_temp AS $$
BEGIN
  PERFORM index_sheet(v.id) FROM revisions v WHERE v.organisation_id = NEW.organisation_id AND v.product_id = NEW.id ORDER BY v.id;
  RETURN NULL;
END $$;
--> statement-breakpoint
CREATE TRIGGER index_sheets AFTER UPDATE OF name, supplier ON products FOR EACH ROW EXECUTE FUNCTION index_renamed_product();
--> statement-breakpoint
-- Words of the organisation that a mistyped word may have meant, nearest first. Swapped neighbours count as one slip; figures
-- are never guessed, because the next figure is another product.
CREATE FUNCTION search_closest(typed text) RETURNS text[] LANGUAGE plpgsql STABLE SET search_path = public, pg_temp AS $$
DECLARE
  own uuid := scope();
  slips integer := CASE WHEN length(typed) < 3 OR typed ~ '^\d+$' THEN 0 WHEN length(typed) <= 5 THEN 1 WHEN length(typed) <= 8 THEN 2 ELSE 3 END;
  nearest text[];
BEGIN
  IF slips = 0 THEN RETURN '{}'; END IF;
  SELECT array_agg(word ORDER BY slipped, similarity(word, typed) DESC, word) INTO nearest
    FROM (
      SELECT word, slipped, min(slipped) OVER () AS least
        FROM sheet_words w, levenshtein_less_equal(w.word, typed, greatest(slips, 2)) AS edits,
          LATERAL (SELECT CASE WHEN edits = 2 AND search_is_swap(w.word, typed) THEN 1 ELSE edits END AS slipped) d
        WHERE w.organisation_id = own AND length(w.word) BETWEEN length(typed) - slips AND length(typed) + slips AND w.word !~ '^\d+$'
          AND slipped <= slips AND (length(typed) > 3 OR left(w.word, 1) = left(typed, 1) OR edits = 2)
    ) found WHERE slipped = least;
  IF nearest IS NULL AND length(typed) >= 5 THEN
    -- Still being typed: the beginning of a longer word.
    SELECT array_agg(word ORDER BY similarity(word, typed) DESC, word) INTO nearest FROM sheet_words w
      WHERE w.organisation_id = own AND length(w.word) > length(typed)
        AND (levenshtein_less_equal(left(w.word, length(typed)), typed, 1) <= 1 OR levenshtein_less_equal(left(w.word, length(typed) + 1), typed, 1) <= 1 OR search_is_swap(left(w.word, length(typed)), typed));
  END IF;
  RETURN coalesce(nearest[1:5], '{}');
END $$;
--> statement-breakpoint
-- Whether two words of one length differ by one pair of neighbours.
CREATE FUNCTION search_is_swap(one text, other text) RETURNS boolean LANGUAGE plpgsql IMMUTABLE PARALLEL SAFE SET search_path = pg_catalog AS $$
BEGIN
  IF length(one) <> length(other) THEN RETURN false; END IF;
  FOR i IN 1 .. length(one) - 1 LOOP
    IF left(one, i - 1) || substr(one, i + 1, 1) || substr(one, i, 1) || substr(one, i + 2) = other THEN RETURN true; END IF;
  END LOOP;
  RETURN false;
END $$;
--> statement-breakpoint
-- One search over the organisation in scope: at most 500 revisions, best first. `wanted` is what was typed; `words` what is
-- left of it without CAS numbers (digits, no leading zeros) and codes (single, lower case). Later ways of finding run only
-- while there is room. Each way has one index that fits any question, so it is planned once and not for each question.
CREATE FUNCTION search_sheets(wanted text, words text, cas text[], codes text[], in_state text, in_language text, in_signal text, among uuid[], is_among boolean, at_most integer)
RETURNS TABLE (revision_id uuid, kind text, closest text) LANGUAGE plpgsql STABLE SECURITY DEFINER SET search_path = public, pg_temp SET client_min_messages = warning SET plan_cache_mode = force_generic_plan AS $$
#variable_conflict use_column
DECLARE
  own uuid := scope();
  room integer := least(greatest(at_most, 1), 500);
  found uuid[] := '{}';
  batch uuid[];
  folded text := search_fold(wanted);
  typed text[] := search_words(words);
  extra text := (SELECT string_agg(quote_literal(key), ' & ') FROM (SELECT 'c ' || c AS key FROM unnest(cas) c UNION ALL SELECT 'k ' || c FROM unnest(codes) c) keys);
  asked tsquery;
  meant_anywhere tsquery;
  meant text;
  stage text;
BEGIN
  IF own IS NULL THEN RETURN; END IF;
  FOREACH stage IN ARRAY ARRAY['name', 'keys', 'name-start', 'name-words', 'supplier', 'name-and-supplier', 'name-part', 'similar-name', 'similar', 'text'] LOOP
    EXIT WHEN room <= 0;
    batch := NULL;
    asked := NULL;
    IF stage IN ('name', 'name-start') THEN
      IF folded <> '' THEN
        SELECT array_agg(hit.revision_id) INTO batch FROM (
          SELECT s.revision_id FROM sheet_search s
            WHERE s.organisation_id = own AND s.name ~>=~ folded AND s.name ~<~ (CASE WHEN stage = 'name' THEN folded || ' ' ELSE folded || chr(1114109) END) AND s.name <> ''
              AND (in_state IS NULL OR s.state = in_state) AND (in_language IS NULL OR s.language = in_language) AND (in_signal IS NULL OR s.signal_word = in_signal)
              AND (is_among IS NULL OR coalesce(s.product_id = ANY (among), false) = is_among) AND s.revision_id <> ALL (found)
            ORDER BY s.standing, s.name, s.uploaded_at DESC LIMIT room) hit;
      END IF;
    ELSIF stage = 'text' THEN
      asked := search_query(CASE WHEN in_language IS NULL THEN ARRAY['en', 'es', 'fr', 'de', 'other'] ELSE ARRAY[in_language] END, wanted);
      IF asked IS NOT NULL THEN
        SELECT array_agg(hit.revision_id) INTO batch FROM (
          SELECT s.revision_id FROM sheet_search s
            WHERE s.organisation_id = own AND s.document @@ asked
              AND (in_state IS NULL OR s.state = in_state) AND (in_language IS NULL OR s.language = in_language) AND (in_signal IS NULL OR s.signal_word = in_signal)
              AND (is_among IS NULL OR coalesce(s.product_id = ANY (among), false) = is_among) AND s.revision_id <> ALL (found)
            ORDER BY s.standing, s.uploaded_at DESC, s.revision_id LIMIT room) hit;
      END IF;
    ELSE
      IF stage = 'keys' THEN
        IF typed = '{}' AND extra IS NOT NULL THEN asked := extra::tsquery; END IF;
      ELSIF stage = 'similar-name' THEN
        -- Only where nothing else was found: a guess beside what was meant is noise.
        IF found = '{}' THEN SELECT m.in_name, m.anywhere, m.meant INTO asked, meant_anywhere, meant FROM search_meant(typed) m; END IF;
      ELSIF stage = 'similar' THEN
        asked := meant_anywhere;
      ELSE
        asked := search_terms(stage, typed);
      END IF;
      IF stage <> 'keys' AND asked IS NOT NULL AND extra IS NOT NULL THEN asked := asked && extra::tsquery; END IF;
      IF asked IS NOT NULL THEN
        SELECT array_agg(hit.revision_id) INTO batch FROM (
          SELECT s.revision_id FROM sheet_search s
            WHERE s.organisation_id = own AND s.keys @@ asked
              AND (in_state IS NULL OR s.state = in_state) AND (in_language IS NULL OR s.language = in_language) AND (in_signal IS NULL OR s.signal_word = in_signal)
              AND (is_among IS NULL OR coalesce(s.product_id = ANY (among), false) = is_among) AND s.revision_id <> ALL (found)
            ORDER BY s.standing, s.name, s.uploaded_at DESC LIMIT room) hit;
      END IF;
    END IF;
    CONTINUE WHEN batch IS NULL;
    RETURN QUERY SELECT hit, stage, CASE WHEN stage IN ('similar-name', 'similar') THEN meant END FROM unnest(batch) hit;
    found := found || batch;
    room := room - cardinality(batch);
  END LOOP;
END $$;
--> statement-breakpoint
-- All typed words among the keys of one way of finding; null when that way has none. Short words and figures match whole,
-- except the last, which may still be being typed.
CREATE FUNCTION search_terms(stage text, typed text[]) RETURNS tsquery LANGUAGE plpgsql STABLE SET search_path = public, pg_temp AS $$
DECLARE
  own uuid := scope();
  word text;
  is_open boolean;
  terms text;
  parts text[];
  has_parts boolean := false;
BEGIN
  FOR i IN 1 .. cardinality(typed) LOOP
    word := typed[i];
    is_open := i = cardinality(typed) OR length(word) >= 3 AND word !~ '^\d+$';
    parts := ARRAY[]::text[];
    IF stage = 'name-part' AND length(word) >= 3 THEN
      parts := ARRAY(SELECT w.word FROM sheet_words w WHERE w.organisation_id = own AND w.word LIKE '%' || typed[i] || '%' LIMIT 50);
      has_parts := has_parts OR parts <> '{}';
    END IF;
    terms := concat_ws(' & ', terms, CASE stage
      WHEN 'name-words' THEN search_key('n', word, is_open)
      WHEN 'supplier' THEN search_key('s', word, is_open)
      ELSE '(' || array_to_string(ARRAY[search_key('n', word, is_open), search_key('s', word, is_open)]
        || ARRAY(SELECT search_key(kind, part, false) FROM unnest(parts) part, unnest(ARRAY['n', 's']) kind), ' | ') || ')' END);
  END LOOP;
  IF stage = 'name-part' AND NOT has_parts THEN RETURN NULL; END IF;
  RETURN terms::tsquery;
END $$;
--> statement-breakpoint
-- The typed words with each unknown one replaced by the nearest known ones; null when a word has none, or all are known.
CREATE FUNCTION search_meant(typed text[], OUT in_name tsquery, OUT anywhere tsquery, OUT meant text) LANGUAGE plpgsql STABLE SET search_path = public, pg_temp AS $$
DECLARE
  own uuid := scope();
  one text;
  near text[];
  is_known boolean;
  is_replaced boolean := false;
  names text[] := '{}';
  all_terms text[] := '{}';
BEGIN
  FOREACH one IN ARRAY typed LOOP
    is_known := length(one) < 3 OR one ~ '^\d+$' OR EXISTS (SELECT 1 FROM sheet_words w WHERE w.organisation_id = own AND w.word LIKE one || '%');
    near := CASE WHEN is_known THEN ARRAY[one] ELSE search_closest(one) END;
    IF near = '{}' THEN RETURN; END IF;
    is_replaced := is_replaced OR NOT is_known;
    names := names || (SELECT '(' || string_agg(search_key('n', each, is_known), ' | ') || ')' FROM unnest(near) each);
    all_terms := all_terms || (SELECT '(' || string_agg(search_key('n', each, is_known) || ' | ' || search_key('s', each, is_known), ' | ') || ')' FROM unnest(near) each);
    meant := concat_ws(' ', meant, near[1]);
  END LOOP;
  IF is_replaced THEN
    in_name := array_to_string(names, ' & ')::tsquery;
    anywhere := array_to_string(all_terms, ' & ')::tsquery;
  END IF;
END $$;
--> statement-breakpoint
DO $$
DECLARE f text;
BEGIN
  FOR f IN SELECT p.oid::regprocedure::text FROM pg_proc p WHERE p.pronamespace = 'public'::regnamespace AND p.proname IN ('search_plain', 'search_fold', 'search_words', 'search_config', 'search_document', 'search_query', 'search_closest', 'search_is_swap', 'search_terms', 'search_key', 'search_meant', 'search_sheets', 'index_sheet') LOOP
    EXECUTE format('REVOKE ALL ON FUNCTION %s FROM PUBLIC', f);
    EXECUTE format('GRANT EXECUTE ON FUNCTION %s TO kneeboard_app, kneeboard_search', f);
  END LOOP;
END $$;
--> statement-breakpoint
GRANT CREATE ON SCHEMA public TO kneeboard_search;
--> statement-breakpoint
ALTER FUNCTION search_sheets(text, text, text[], text[], text, text, text, uuid[], boolean, integer) OWNER TO kneeboard_search;
--> statement-breakpoint
REVOKE CREATE ON SCHEMA public FROM kneeboard_search;
--> statement-breakpoint
-- What is there already: its fields; the text of sheets read before this comes with the next reading.
DO $$
DECLARE one uuid;
BEGIN
  FOR one IN SELECT DISTINCT l.organisation_id FROM logins l LOOP
    PERFORM set_config('app.organisation', one::text, true);
    PERFORM index_sheet(v.id) FROM revisions v WHERE v.organisation_id = one;
  END LOOP;
  PERFORM set_config('app.organisation', '', true);
END $$;
