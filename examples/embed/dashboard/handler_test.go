package main

import (
	"encoding/json"
	"net/http"
	"net/http/httptest"
	"net/url"
	"os"
	"strings"
	"sync"
	"testing"

	"example.com/dosewright/repl"
)

func opened(t *testing.T) *board {
	t.Helper()
	b, err := newBoard(t.Context(), os.DirFS("."), "conventions.budget")
	if err != nil {
		t.Fatal(err)
	}
	return b
}

// get asks the handler and reads its answer.
func get(t *testing.T, h http.Handler, path, name, value string, into any) int {
	t.Helper()
	w := httptest.NewRecorder()
	h.ServeHTTP(w, httptest.NewRequest(http.MethodGet, path+"?"+url.Values{name: {value}}.Encode(), nil))
	if err := json.Unmarshal(w.Body.Bytes(), into); err != nil {
		t.Errorf("%s: %v: %s", path, err, w.Body)
	}
	return w.Code
}

func TestTiles(t *testing.T) {
	var list []shown
	if code := get(t, opened(t).handler(), "/tiles", "", "", &list); code != http.StatusOK || len(list) != len(tiles()) {
		t.Fatalf("%d: %v", code, list)
	}
	if v := list[0].Value; v.Unit != "wafer/h" || v.Uncertainty == nil || !strings.HasSuffix(v.Text, " wafer/h") {
		t.Errorf("the throughput is %+v", v)
	}
	if v := list[1].Value; v.Plane != "WAFER" {
		t.Errorf("the power is %+v", v)
	}
}

func TestQuestions(t *testing.T) {
	h := opened(t).handler()
	var v, same repl.Record
	if code := get(t, h, "/what-if", "dose", "34 mJ/cm^2 at WAFER", &v); code != http.StatusOK {
		t.Fatalf("%d: %+v", code, v)
	}
	if code := get(t, h, "/eval", "q", "wph", &same); code != http.StatusOK || same.Value != v.Value {
		t.Errorf("%d: wph is %s, and with its own dose %s", code, same.Value, v.Value)
	}
	var why reason
	if code := get(t, h, "/why", "name", "P_wafer", &why); code != http.StatusOK || len(why.Below) != 2 || why.Line == 0 {
		t.Errorf("%d: %+v", code, why)
	}
}

func TestRefusals(t *testing.T) {
	h := opened(t).handler()
	for _, c := range []struct {
		path, name, value string
		status, column    int
		says              string
	}{
		{"/eval", "q", "wph + 1 W", http.StatusUnprocessableEntity, 1, "power"},
		{"/eval", "q", "2 * nothing", http.StatusUnprocessableEntity, 5, "nothing"},
		{"/eval", "q", "x = 3", http.StatusUnprocessableEntity, 1, "expression"},
		{"/eval", "q", "1" + strings.Repeat("+1", 300), http.StatusRequestEntityTooLarge, 0, "500"},
		{"/eval", "q", strings.Repeat("x", 4*longest), http.StatusRequestURITooLong, 0, "too long"},
		{"/what-if", "dose", "34 W", http.StatusUnprocessableEntity, 1, "power"},
		{"/why", "name", "wpx", http.StatusUnprocessableEntity, 1, "did you mean wph"},
	} {
		var p problem
		if code := get(t, h, c.path, c.name, c.value, &p); code != c.status || p.Column != c.column || !strings.Contains(p.Error, c.says) {
			t.Errorf("%s %.40s: %d %+v, want %d with %q at %d", c.path, c.value, code, p, c.status, c.says, c.column)
		}
	}
	w := httptest.NewRecorder()
	h.ServeHTTP(w, httptest.NewRequest(http.MethodPost, "/eval", strings.NewReader("q=1")))
	if w.Code != http.StatusMethodNotAllowed {
		t.Errorf("a POST gives %d", w.Code)
	}
}

// What nobody defined over HTTP stays as it is, whoever asks.
func TestManyAtOnce(t *testing.T) {
	b := opened(t)
	h := b.handler()
	var all sync.WaitGroup
	for range atOnce {
		all.Go(func() {
			for range 50 {
				var v repl.Record
				if code := get(t, h, "/eval", "q", "wph * 2", &v); code != http.StatusOK {
					t.Errorf("%d: %+v", code, v)
				}
			}
		})
	}
	all.Wait()
	for range atOnce {
		b.slots <- struct{}{}
	}
	var p problem
	if code := get(t, h, "/eval", "q", "1", &p); code != http.StatusServiceUnavailable {
		t.Errorf("with all places taken: %d %+v", code, p)
	}
}
